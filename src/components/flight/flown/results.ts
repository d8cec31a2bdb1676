import type { AscentFigures } from '#contract/ascent-job.ts';
import type { StudyAscent } from '#contract/study-ascents.ts';
import type { InputOrbit, InputSite } from '#contract/study-inputs.ts';
import type { PrintedSum } from '#core/printed/closing.ts';

/** A site with what is known of its flight to the orbit looked at. */
export interface FlownRow {
  site: InputSite;
  ascent: StudyAscent | undefined;
}

const rankOf = ({ ascent }: FlownRow): number => ascent?.figures?.payloadKg ?? (ascent?.figures ? -1 : -2);

/** Largest payload first, then those that gave none, then those not flown; equal ones in the sites' order. */
export function flownRows(
  sites: readonly InputSite[],
  ascents: readonly StudyAscent[],
  orbitId: string,
): FlownRow[] {
  const bySite = new Map(
    ascents.flatMap((ascent) => (ascent.orbitId === orbitId ? [[ascent.siteId, ascent] as const] : [])),
  );
  return sites
    .map((site) => ({ site, ascent: bySite.get(site.siteId) }))
    .sort((a, b) => rankOf(b) - rankOf(a));
}

/** The lines of a flown budget to injection, in the order they are printed; a centrifugal gain is taken off. */
export const ACCOUNT_LINES = [
  'required speed',
  'remainder',
  'gravity',
  'drag',
  'steering',
  'back-pressure',
  'centrifugal',
] as const;

/** A flight's ideal Δv as the sum of its lines; undefined where it met no orbit. */
export function accountOf(figures: AscentFigures | null | undefined): PrintedSum | undefined {
  if (!figures?.converged) return undefined;
  const { idealDeltaVMps, relativeSpeedMps, remainderMps, centrifugalMps, lossesMps } = figures;
  const { gravity, drag, steering, backPressure } = lossesMps;
  const required = relativeSpeedMps - remainderMps;
  const parts = [required, remainderMps, gravity, drag, steering, backPressure, -centrifugalMps];
  return { parts, total: idealDeltaVMps };
}

/** A site's year of flown ascents. */
export interface FlownYear {
  site: InputSite;
  ascents: (StudyAscent | undefined)[];
  /** Null until every orbit of the manifest was flown; an orbit without payload counts zero. */
  payloadPerYearKg: number | null;
}

export function flownYears(
  sites: readonly InputSite[],
  orbits: readonly InputOrbit[],
  ascents: readonly StudyAscent[],
): FlownYear[] {
  const known = new Map(ascents.map((ascent) => [`${ascent.siteId} ${ascent.orbitId}`, ascent]));
  const years = sites.map((site): FlownYear => {
    const row = orbits.map(({ orbitId }) => known.get(`${site.siteId} ${orbitId}`));
    const whole = row.every((ascent) => ascent?.figures);
    const sum = row.reduce(
      (kg, ascent, at) => kg + (ascent?.figures?.payloadKg ?? 0) * (orbits[at]?.flightsPerYear ?? 0),
      0,
    );
    return { site, ascents: row, payloadPerYearKg: whole ? sum : null };
  });
  return years.sort((a, b) => (b.payloadPerYearKg ?? -1) - (a.payloadPerYearKg ?? -1));
}

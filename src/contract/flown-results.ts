/* A study's closed-form results with what was flown in their place, where its losses are those of flown ascents. */
import type { NoAscentReason } from './ascent.ts';
import type { AscentFigures } from './ascent-job.ts';
import type { FlownOrbit, OrbitResult, SiteResult } from './evaluate.ts';

type FlownFigures = Extract<AscentFigures, { converged: true }>;

/** What is known of the ascent from a site to an orbit, for the inputs as they are. */
export type FlownState =
  | { kind: 'flown'; figures: FlownFigures }
  /** Flown for, and there is none: it carries nothing. */
  | { kind: 'none'; reason: NoAscentReason }
  /** Not flown for these inputs yet: nothing is known. */
  | { kind: 'pending' };

const NO_ASCENT: Record<NoAscentReason, string> = {
  'out-of-reach': 'out of reach',
  'does-not-lift-off': 'does not lift off',
  'too-much-after-injection': 'upper stages hold too little for what follows injection',
  'falls-short': 'falls short',
  'no-permitted-heading': 'no heading within the permitted azimuths',
  'did-not-converge': 'no ascent found',
};
export const PENDING = 'not flown yet';

/** The words of an ascent that gives no payload; null where it gives one. */
export function noAscentInWords(state: FlownState): string | null {
  if (state.kind === 'flown') return null;
  return state.kind === 'none' ? NO_ASCENT[state.reason] : PENDING;
}

/**
 * A result with the flown losses. Ideal Δv less the required speed of the plane flown is what was lost; a dogleg was
 * flown within it. Every other line stays the closed form's.
 */
function withFigures(orbit: FlownOrbit, figures: FlownFigures): FlownOrbit {
  const { idealDeltaVMps, relativeSpeedMps, remainderMps, payloadKg } = figures;
  const { planeChange, transfer, reserve } = orbit.deltaVMps;
  const required = relativeSpeedMps - remainderMps;
  const losses = idealDeltaVMps - required;
  return {
    ...orbit,
    requiredSpeedMps: required,
    deltaVMps: {
      ...orbit.deltaVMps,
      required,
      losses,
      dogleg: 0,
      total: required + losses + planeChange + transfer + reserve,
    },
    payloadKg,
    shortfallMps: null,
  };
}

/** An orbit's result as flown; one without an ascent has no payload. */
export function flownOrbit(orbit: OrbitResult, state: FlownState): OrbitResult {
  if (orbit.way === 'out-of-reach') return orbit;
  if (state.kind === 'flown') return withFigures(orbit, state.figures);
  return { ...orbit, payloadKg: null, shortfallMps: null };
}

/**
 * A site's result as flown, orbits in the order of the manifest.
 * @param states one an orbit
 * @returns payload a year null while an orbit that is flown each year is pending
 */
export function flownSite(
  result: SiteResult,
  states: readonly FlownState[],
  flightsPerYear: readonly number[],
): SiteResult {
  const orbits = result.orbits.map((orbit, at) => flownOrbit(orbit, states[at] ?? { kind: 'pending' }));
  const untold = orbits.some(
    ({ way }, at) =>
      way !== 'out-of-reach' && states[at]?.kind === 'pending' && (flightsPerYear[at] ?? 0) > 0,
  );
  const payload = orbits.reduce(
    (sum, { payloadKg }, at) => sum + (payloadKg ?? 0) * (flightsPerYear[at] ?? 0),
    0,
  );
  return { ...result, orbits, payloadPerYearKg: untold ? null : payload };
}

import type { Criterion } from '#contract/criterion.ts';
import type { OrbitResult, SiteResult } from '#contract/evaluate.ts';
import { noAscentInWords, PENDING, type FlownState } from '#contract/flown-results.ts';
import { formatNumber, listInWords } from '#contract/format.ts';
import type { QuantityKey } from '#contract/quantity.ts';
import type { RankingCell } from '#contract/ranking.ts';

/** A cell of a computed criterion, with words where the number alone would mislead. */
export interface ComputedFigure {
  cell: RankingCell;
  note?: string;
}

/** What a site's computed criteria are read from; results stand in the order of the manifest. */
export interface SiteFlight {
  result: SiteResult;
  /** Where the losses are those of flown ascents: what is flown for each orbit; the result is as flown. */
  states?: readonly FlownState[];
  lowestInclinationDeg: number;
  flightsPerYear: readonly number[];
}

const MISSING: ComputedFigure = { cell: null };
const NO_VEHICLE: ComputedFigure = { cell: null, note: 'no vehicle yet' };
const KG_PER_TONNE = 1000;

/** One orbit of a site with why it gives no payload, in words. */
interface Leg {
  orbit: OrbitResult;
  /** Why it gives none for certain; null where it gives one or nobody can say. */
  fails: string | null;
  /** What stands where nobody can say. */
  untold: ComputedFigure;
}

const turnOf = ({ orbit }: Leg): number | null =>
  orbit.way === 'out-of-reach' ? null : orbit.turnDeg + orbit.planeChangeDeg;

function failing(orbit: OrbitResult, state: FlownState | undefined): string | null {
  if (orbit.way === 'out-of-reach') return 'out of reach';
  if (state) return state.kind === 'none' ? noAscentInWords(state) : null;
  return orbit.shortfallMps === null
    ? null
    : `falls short by ${formatNumber(Math.ceil(orbit.shortfallMps))} m/s`;
}

function legsOf({ result, states }: SiteFlight): Leg[] {
  return result.orbits.map((orbit, at) => ({
    orbit,
    fails: failing(orbit, states?.[at]),
    untold: states ? { cell: null, note: PENDING } : NO_VEHICLE,
  }));
}

function payload({ orbit, fails, untold }: Leg): ComputedFigure {
  if (fails) return { cell: 0, note: fails };
  return orbit.payloadKg === null ? untold : { cell: orbit.payloadKg };
}

function payloadPerYear(flight: SiteFlight): ComputedFigure {
  const { result, flightsPerYear } = flight;
  const legs = legsOf(flight);
  if (result.payloadPerYearKg === null) return legs[0]?.untold ?? NO_VEHICLE;
  const without = legs.filter(({ fails }, at) => (flightsPerYear[at] ?? 0) > 0 && fails !== null);
  const cell = result.payloadPerYearKg / KG_PER_TONNE;
  return without.length === 0
    ? { cell }
    : { cell, note: `${listInWords(without.map(({ orbit }) => orbit.code))} counted as 0` };
}

/** A figure per orbit, or the worst over the manifest: an orbit without one makes the whole `worst`. */
function perOrbit(
  legs: readonly Leg[],
  figure: (leg: Leg) => number | null,
  worst: (...figures: number[]) => number,
): ComputedFigure {
  const first = legs.find(({ fails }) => fails !== null);
  if (first) {
    const words = first.fails ?? '';
    return { cell: 'worst', note: legs.length === 1 ? words : `${first.orbit.code} ${words}` };
  }
  const figures = legs.map(figure).filter((one) => one !== null);
  return figures.length === 0 ? MISSING : { cell: worst(...figures) };
}

/** The first leg of which nobody can say what it carries. */
const untoldOf = (legs: readonly Leg[]): Leg | undefined =>
  legs.find(({ orbit, fails }) => fails === null && orbit.payloadKg === null);

/** How many orbits give no payload; without a vehicle none of those within reach can be told. */
function fallenShort(legs: readonly Leg[]): ComputedFigure {
  return untoldOf(legs)?.untold ?? { cell: legs.filter(({ fails }) => fails !== null).length };
}

/** What a site lacks to reach an orbit: none where it brings payload there. An orbit fallen short has a figure here. */
function shortfall(legs: readonly Leg[]): ComputedFigure {
  const none = legs.find(({ orbit, fails }) => fails !== null && orbit.shortfallMps === null);
  if (none) {
    const words = none.fails ?? '';
    return { cell: 'worst', note: legs.length === 1 ? words : `${none.orbit.code} ${words}` };
  }
  return untoldOf(legs)?.untold ?? { cell: Math.max(...legs.map(({ orbit }) => orbit.shortfallMps ?? 0)) };
}

type Line = keyof OrbitResult['deltaVMps'];

/** Lines that a flown ascent moves: while it is pending they are not known. */
const FLOWN_LINES: ReadonlySet<Line> = new Set<Line>(['required', 'losses', 'dogleg', 'total']);

/** The greatest sum of some lines of the Δv budget over the orbits. */
const budget =
  (...lines: readonly Line[]) =>
  ({ states }: SiteFlight, legs: readonly Leg[]): ComputedFigure => {
    const pending = states && lines.some((line) => FLOWN_LINES.has(line)) ? untoldOf(legs) : undefined;
    if (pending && legs.every(({ fails }) => fails === null)) return pending.untold;
    return perOrbit(
      legs,
      ({ orbit }) => lines.reduce((sum, line) => sum + (orbit.deltaVMps[line] ?? 0), 0),
      Math.max,
    );
  };

const READERS: Record<QuantityKey, (flight: SiteFlight, legs: readonly Leg[]) => ComputedFigure> = {
  'payload-per-year': payloadPerYear,
  payload: (_, [leg]) => (leg ? payload(leg) : MISSING),
  'delta-v': budget('total'),
  'required-speed': budget('required'),
  losses: budget('losses'),
  'turn-cost': budget('dogleg', 'planeChange'),
  dogleg: budget('dogleg'),
  'plane-change': budget('planeChange'),
  transfer: budget('transfer'),
  shortfall: (_, legs) => shortfall(legs),
  'rotation-speed': ({ result }) => ({ cell: result.rotationSpeedMps }),
  'rotation-gain': (_, legs) => perOrbit(legs, ({ orbit }) => orbit.rotationGainMps, Math.min),
  turn: (_, legs) => perOrbit(legs, turnOf, Math.max),
  'lowest-inclination': ({ lowestInclinationDeg }) => ({ cell: lowestInclinationDeg }),
  'orbits-fallen-short': (_, legs) => fallenShort(legs),
  'orbits-out-of-reach': (_, legs) => ({
    cell: legs.filter(({ orbit }) => orbit.way === 'out-of-reach').length,
  }),
};

/** Quantities that need no target orbit. */
const OF_THE_SITE: ReadonlySet<QuantityKey> = new Set<QuantityKey>(['lowest-inclination', 'rotation-speed']);

/**
 * A computed criterion's figure for a site, in the criterion's unit. An orbit out of reach or fallen short is no
 * missing value: payload 0; Δv and its lines, turn and gain `worst`.
 * @param orbitIndex place of the criterion's orbit in the manifest; null for all of it
 */
export function computedFigure(
  { quantity }: Pick<Criterion, 'quantity'>,
  orbitIndex: number | null,
  flight: SiteFlight,
): ComputedFigure {
  const legs = legsOf(flight);
  const asked = orbitIndex === null ? legs : legs.slice(orbitIndex, orbitIndex + 1);
  if (quantity === null) return MISSING;
  if (asked.length === 0 && !OF_THE_SITE.has(quantity)) return MISSING;
  return READERS[quantity](flight, asked);
}

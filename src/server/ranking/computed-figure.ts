import type { Criterion } from '#contract/criterion.ts';
import type { OrbitResult, SiteResult } from '#contract/evaluate.ts';
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
  lowestInclinationDeg: number;
  flightsPerYear: readonly number[];
}

const MISSING: ComputedFigure = { cell: null };
const NO_VEHICLE: ComputedFigure = { cell: null, note: 'no vehicle yet' };
const KG_PER_TONNE = 1000;

const turnOf = (orbit: OrbitResult): number | null =>
  orbit.way === 'out-of-reach' ? null : orbit.turnDeg + orbit.planeChangeDeg;

/** Why an orbit gives no payload; null where it gives one. */
function failing(orbit: OrbitResult): string | null {
  if (orbit.way === 'out-of-reach') return 'out of reach';
  return orbit.shortfallMps === null
    ? null
    : `falls short by ${formatNumber(Math.ceil(orbit.shortfallMps))} m/s`;
}

function payload(orbit: OrbitResult): ComputedFigure {
  const note = failing(orbit);
  if (note) return { cell: 0, note };
  return orbit.payloadKg === null ? NO_VEHICLE : { cell: orbit.payloadKg };
}

function payloadPerYear({ result, flightsPerYear }: SiteFlight): ComputedFigure {
  if (result.payloadPerYearKg === null) return NO_VEHICLE;
  const without = result.orbits.filter(
    (orbit, at) => (flightsPerYear[at] ?? 0) > 0 && failing(orbit) !== null,
  );
  const cell = result.payloadPerYearKg / KG_PER_TONNE;
  return without.length === 0
    ? { cell }
    : { cell, note: `${listInWords(without.map(({ code }) => code))} counted as 0` };
}

/** A figure per orbit, or the worst over the manifest: an orbit without one makes the whole `worst`. */
function perOrbit(
  orbits: readonly OrbitResult[],
  figure: (orbit: OrbitResult) => number | null,
  worst: (...figures: number[]) => number,
): ComputedFigure {
  const unflown = orbits.filter((orbit) => failing(orbit) !== null);
  const [first] = unflown;
  if (first) {
    const words = failing(first) ?? '';
    return { cell: 'worst', note: orbits.length === 1 ? words : `${first.code} ${words}` };
  }
  const figures = orbits.map(figure).filter((one) => one !== null);
  return figures.length === 0 ? MISSING : { cell: worst(...figures) };
}

/** How many orbits give no payload; without a vehicle none of those within reach can be told. */
function fallenShort(orbits: readonly OrbitResult[]): ComputedFigure {
  const untold = orbits.some((orbit) => failing(orbit) === null && orbit.payloadKg === null);
  return untold ? NO_VEHICLE : { cell: orbits.filter((orbit) => failing(orbit) !== null).length };
}

/** What a site lacks to reach an orbit: none where it brings payload there. An orbit fallen short has a figure here. */
function shortfall(orbits: readonly OrbitResult[]): ComputedFigure {
  const far = orbits.find(({ way }) => way === 'out-of-reach');
  if (far) return { cell: 'worst', note: orbits.length === 1 ? 'out of reach' : `${far.code} out of reach` };
  if (orbits.some(({ payloadKg, shortfallMps }) => payloadKg === null && shortfallMps === null))
    return NO_VEHICLE;
  return { cell: Math.max(...orbits.map(({ shortfallMps }) => shortfallMps ?? 0)) };
}

type Line = keyof OrbitResult['deltaVMps'];

/** The greatest sum of some lines of the Δv budget over the orbits. */
const budget =
  (...lines: readonly Line[]) =>
  (_: SiteFlight, orbits: readonly OrbitResult[]): ComputedFigure =>
    perOrbit(
      orbits,
      ({ deltaVMps }) => lines.reduce((sum, line) => sum + (deltaVMps[line] ?? 0), 0),
      Math.max,
    );

const READERS: Record<QuantityKey, (flight: SiteFlight, orbits: readonly OrbitResult[]) => ComputedFigure> = {
  'payload-per-year': payloadPerYear,
  payload: (_, [orbit]) => (orbit ? payload(orbit) : MISSING),
  'delta-v': budget('total'),
  'required-speed': budget('required'),
  losses: budget('losses'),
  'turn-cost': budget('dogleg', 'planeChange'),
  dogleg: budget('dogleg'),
  'plane-change': budget('planeChange'),
  transfer: budget('transfer'),
  shortfall: (_, orbits) => shortfall(orbits),
  'rotation-speed': ({ result }) => ({ cell: result.rotationSpeedMps }),
  'rotation-gain': (_, orbits) => perOrbit(orbits, (orbit) => orbit.rotationGainMps, Math.min),
  turn: (_, orbits) => perOrbit(orbits, turnOf, Math.max),
  'lowest-inclination': ({ lowestInclinationDeg }) => ({ cell: lowestInclinationDeg }),
  'orbits-fallen-short': (_, orbits) => fallenShort(orbits),
  'orbits-out-of-reach': (_, orbits) => ({ cell: orbits.filter(({ way }) => way === 'out-of-reach').length }),
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
  const { orbits } = flight.result;
  const asked = orbitIndex === null ? orbits : orbits.slice(orbitIndex, orbitIndex + 1);
  if (quantity === null) return MISSING;
  if (asked.length === 0 && !OF_THE_SITE.has(quantity)) return MISSING;
  return READERS[quantity](flight, asked);
}

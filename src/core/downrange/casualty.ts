import type { Corridor } from './corridor.ts';
import { impactRate, impactSteps } from './impact-probability.ts';
import type { Rectangle } from './impact-probability.ts';
import { SEA } from './land-map.ts';
import type { Settlements } from './settlements.ts';
import { halfWidthAt } from './shape.ts';
import type { SpreadPeople } from './spread.ts';
import type { StripPoint } from './strip.ts';
import { NAUTICAL_MILE } from './vehicle-class.ts';
import type { VehicleClass } from './vehicle-class.ts';

/** Effective casualty areas by range: below 50 nautical miles, below 1,750, and from there on, m². */
export type CasualtyAreas = readonly [near: number, middle: number, far: number];

/** A statute mile, exact. */
const MILE = 1609.344;
const squareMiles = (areas: CasualtyAreas): CasualtyAreas =>
  areas.map((area) => area * MILE * MILE) as unknown as CasualtyAreas;

/**
 * Table C-3 as remembered, in square statute miles: to be verified against the regulation before use, and marked so
 * wherever it is shown or printed. A study may change it.
 */
export const REMEMBERED_CASUALTY_AREAS: Readonly<Record<VehicleClass, CasualtyAreas>> = {
  small: squareMiles([0.43, 0.13, 3.59e-6]),
  medium: squareMiles([0.53, 0.0022, 8.3e-4]),
  'medium-large': squareMiles([0.71, 0.11, 0.108]),
  large: squareMiles([1.94, 0.62, 0.717]),
};

/** Said wherever the casualty areas are shown. */
export const VERIFY_CASUALTY_AREAS = 'verify against the regulation';

/** Casualties a launch that 14 CFR 420.25 compares with. */
export const EXPECTATION_LIMIT = 1e-4;

/** The effective casualty area at a range. */
export function casualtyAreaAt(areas: CasualtyAreas, range: number): number {
  if (range < 50 * NAUTICAL_MILE) return areas[0];
  return range < 1750 * NAUTICAL_MILE ? areas[1] : areas[2];
}

/** Simpson's rule is good to 1e-4 over half a σ; wider rectangles are taken in parts. */
function probabilityOver(rectangle: Rectangle, sigma: number, rate: number): number {
  const { y1, y2 } = rectangle;
  const parts = Math.max(1, Math.ceil((y2 - y1) / (sigma / 2)));
  let sum = 0;
  for (let part = 0; part < parts; part += 1) {
    const [low, high] = [part, part + 1].map((step) => y1 + (step / parts) * (y2 - y1)) as [number, number];
    sum += impactSteps({ ...rectangle, y1: low, y2: high }, sigma, rate).probability;
  }
  return sum;
}

/** E = P (A_c/A_k) N: casualties expected of N people on an area A_k that an impact falls on with probability P. */
export const expectation = (
  probability: number,
  casualtyArea: number,
  area: number,
  people: number,
): number => (probability * casualtyArea * people) / area;

/**
 * Casualties expected of a settlement, E = P (A_c/A_k) N: the settlement a square of area A_k = N over the place
 * density, centred on its point.
 * @see downrangeReferences.appendixC, tests/reference/downrange-casualty.csv
 */
export function placeExpectation(
  { shape }: Corridor,
  { s, y }: StripPoint,
  people: number,
  placeDensity: number,
  areas: CasualtyAreas,
): number {
  if (people === 0) return 0;
  const range = Math.max(0, s);
  const area = people / placeDensity;
  const half = Math.sqrt(area) / 2;
  const rectangle = { x1: s - half, x2: s + half, y1: y - half, y2: y + half };
  const probability = probabilityOver(rectangle, halfWidthAt(shape, range) / 3, impactRate(range));
  return expectation(probability, casualtyAreaAt(areas, range), area, people);
}

/** Casualties expected in the settlements of a corridor, one figure each, in their order. */
export function settlementExpectations(
  corridor: Corridor,
  settlements: Settlements,
  inside: readonly number[],
  placeDensity: number,
  areas: CasualtyAreas,
): Float64Array {
  return Float64Array.from(inside, (at) => {
    const point = corridor.strip.exact(settlements.place(at));
    return placeExpectation(corridor, point, settlements.people(at), placeDensity, areas);
  });
}

/**
 * Slices that spread people are summed by: finer near the launch point, where the impact point dwells; the ranges at
 * which tables C-2 and C-3 change fall between slices.
 */
const BANDS: readonly (readonly [toMiles: number, stepMiles: number])[] = [
  [20, 1],
  [100, 2.5],
  [500, 10],
  [5000, 25],
];
const ACROSS = 12;

function* slicesTo(range: number): Generator<readonly [number, number]> {
  let from = 0;
  for (const [to, step] of BANDS)
    while (from < Math.min(to * NAUTICAL_MILE, range)) {
      const next = Math.min(from + step * NAUTICAL_MILE, to * NAUTICAL_MILE, range);
      yield [from, next];
      from = next;
    }
}

/** Casualties expected among spread people, and the least it can be: some land's people may be unknown. */
export interface SpreadExpectation {
  readonly expectation: number;
  readonly complete: boolean;
}

/**
 * Casualties expected among the people spread over a corridor's land: the corridor in rectangles, each taken for land
 * of the country under its middle, E = P A_c × people to the square metre.
 */
export function spreadExpectation(
  corridor: Corridor,
  spread: SpreadPeople,
  areas: CasualtyAreas,
): SpreadExpectation {
  let sum = 0;
  let complete = true;
  for (const [x1, x2] of slicesTo(corridor.shape.range)) {
    const middle = (x1 + x2) / 2;
    const half = halfWidthAt(corridor.shape, middle);
    const rate = impactRate(middle);
    const area = casualtyAreaAt(areas, middle);
    for (let part = 0; part < ACROSS; part += 1) {
      const y1 = half * ((2 * part) / ACROSS - 1);
      const y2 = half * ((2 * (part + 1)) / ACROSS - 1);
      const country = spread.map.countryAt(corridor.strip.path.beside(middle, (y1 + y2) / 2));
      if (country === SEA) continue;
      const density = spread.density(country);
      if (density === null) complete = false;
      else sum += impactSteps({ x1, x2, y1, y2 }, half / 3, rate).probability * area * density;
    }
  }
  return { expectation: sum, complete };
}

import { describe, expect, test, vi } from 'vitest';
import {
  REMEMBERED_CASUALTY_AREAS,
  NAUTICAL_MILE as NM,
  corridorOf,
  surveyCorridor,
} from '#core/downrange/index.ts';
import { casualtyAreaAt, expectation, placeExpectation } from '#core/downrange/casualty.ts';
import {
  FAILURE_PROBABILITY,
  FLIGHT_SECONDS,
  impactRate,
  impactSteps,
} from '#core/downrange/impact-probability.ts';
import { halfWidthAt, shapeOf } from '#core/downrange/shape.ts';
import { LONGEST_RANGE } from '#core/downrange/vehicle-class.ts';
import { boxWorld } from '#tests/support/downrange-world.ts';
import { reference } from '#tests/support/reference.ts';

// The whole world is read, and geodesics are many.
vi.setConfig({ testTimeout: 60_000, hookTimeout: 60_000 });

const MILE = 1609.344;
const small = shapeOf('small', LONGEST_RANGE);

/** The worked cases' givens: x and y in nautical miles, areas in square statute miles. */
const CASES = {
  middle: { x: [200, 205], y: [10, 15], casualtyMi2: 0.13, areaMi2: 25, people: 10_000 },
  far: { x: [4000, 4050], y: [0, 50], casualtyMi2: 3.59e-6, areaMi2: 2500, people: 5e6 },
  near: { x: [20, 22], y: [3, 5], casualtyMi2: 0.43, areaMi2: 4, people: 2000 },
} as const;

function stepOf(name: keyof typeof CASES, step: string): number {
  const { x, y, casualtyMi2, areaMi2, people } = CASES[name];
  const middle = ((x[0] + x[1]) / 2) * NM;
  const sigma = halfWidthAt(small, middle) / 3;
  const rate = impactRate(middle);
  const [x1, x2, y1, y2] = [...x, ...y].map((miles) => miles * NM) as [number, number, number, number];
  const steps = impactSteps({ x1, x2, y1, y2 }, sigma, rate);
  const casualtyArea = casualtyAreaAt(REMEMBERED_CASUALTY_AREAS.small, middle);
  expect(casualtyArea).toBeWithin(casualtyMi2 * MILE * MILE, { kind: 'rel', value: 1e-12 });
  const answers: Readonly<Record<string, number>> = {
    'half width': (sigma * 3) / NM,
    sigma: sigma / NM,
    'y1/sigma': steps.edges[0],
    'middle/sigma': steps.edges[1],
    'y2/sigma': steps.edges[2],
    'bell at y1': steps.bells[0],
    'bell at the middle': steps.bells[1],
    'bell at y2': steps.bells[2],
    rate: rate / NM,
    'share across': steps.across,
    dwell: steps.dwell,
    probability: steps.probability,
    expectation: expectation(steps.probability, casualtyArea, areaMi2 * MILE * MILE, people),
  };
  return answers[step] ?? NaN;
}

/** The published row's half-width is given, not derived. */
const publishedProbability = (): number =>
  impactSteps(
    { x1: 200 * NM, x2: 205 * NM, y1: 10 * NM, y2: 15 * NM },
    (76.14454 / 3) * NM,
    impactRate(202 * NM),
  ).probability;

/** Time over ground by table C-2 from 0 to 5,000 nm, in steps of a nautical mile. */
const overflightTime = (): number =>
  Array.from({ length: 5000 }, (_, mile) => NM / impactRate((mile + 0.5) * NM)).reduce(
    (sum, t) => sum + t,
    0,
  );

describe('the worked cases of casualty expectation', () => {
  test.each(reference('downrange-casualty'))('$id: $case, $step', (row) => {
    const published = row.step === 'overflight time' ? overflightTime() : publishedProbability();
    const found = row.case === 'published' ? published : stepOf(row.case as keyof typeof CASES, row.step);
    expect(found).toBeWithin(row.expected, row.tolerance);
  });
});

describe('placeExpectation', () => {
  // A settlement across the flight line: P_f/C · A_c · density · dwell · the normal share, the error function by
  // Abramowitz and Stegun 7.1.26 [from memory], good to 1.5e-7.
  const normalShare = (u: number): number => {
    const x = u / Math.SQRT2;
    const t = 1 / (1 + 0.3275911 * x);
    const series = [0.254829592, -0.284496736, 1.421413741, -1.453152027, 1.061405429];
    const sum = series.reduce((total, factor, at) => total + factor * t ** (at + 1), 0);
    return 1 - sum * Math.exp(-x * x);
  };

  test('is the normal share of a wide place, though Simpson’s rule over all of it would miss', () => {
    const corridor = corridorOf({ latitudeDeg: 0, longitudeDeg: 0 }, 90, 'small', LONGEST_RANGE);
    const [people, density] = [15e6, 1500 / 1e6];
    const s = 150 * NM;
    const side = Math.sqrt(people / density);
    const sigma = halfWidthAt(corridor.shape, s) / 3;
    const dwell = side / impactRate(s);
    const area = 0.13 * MILE * MILE;
    const expected =
      normalShare(side / 2 / sigma) * ((FAILURE_PROBABILITY * dwell) / FLIGHT_SECONDS) * area * density;
    const found = placeExpectation(corridor, { s, y: 0 }, people, density, REMEMBERED_CASUALTY_AREAS.small);
    expect(found).toBeWithin(expected, { kind: 'rel', value: 1e-3 });
  });

  test('is none where nobody is listed', () => {
    const corridor = corridorOf({ latitudeDeg: 0, longitudeDeg: 0 }, 90, 'small', LONGEST_RANGE);
    expect(placeExpectation(corridor, { s: 1e6, y: 0 }, 0, 1e-3, REMEMBERED_CASUALTY_AREAS.small)).toBe(0);
  });
});

describe('the expectation among spread people', () => {
  // All the Earth one country of even density: across, 99.73 % of a normal law lies within 3 σ; along, the time over
  // each band of table C-2 times the casualty area of table C-3 there. Worked in the expression below.
  test('over land everywhere is the published tables summed by hand', () => {
    const people = 1e9;
    const world = boxWorld([{ code: 'AA', west: -180, south: -90, east: 180, north: 90, people }]);
    const density = people / 510_065_621.72e6;
    const corridor = corridorOf({ latitudeDeg: 10, longitudeDeg: 170 }, 80, 'large', LONGEST_RANGE);
    const survey = surveyCorridor(world, corridor, {
      placeDensity: 1.5e-3,
      spreads: true,
      casualtyAreas: REMEMBERED_CASUALTY_AREAS.large,
    });
    const bands = [
      [0, 50, 0.75, 1.94],
      [50, 75, 0.75, 0.62],
      [75, 300, 1.73, 0.62],
      [300, 900, 4.25, 0.62],
      [900, 1700, 8.85, 0.62],
      [1700, 1750, 19.75, 0.62],
      [1750, 2600, 19.75, 0.717],
      [2600, 3500, 42.45, 0.717],
      [3500, 4500, 84.85, 0.717],
      [4500, 5000, 154.95, 0.717],
    ] as const;
    const secondsTimesArea = bands.reduce(
      (sum, [from, to, rate, mi2]) => sum + ((to - from) / rate) * mi2 * MILE * MILE,
      0,
    );
    const expected = 0.9973002 * (0.1 / 643) * secondsTimesArea * density;
    expect(survey.expectation.spread).toBeWithin(expected, { kind: 'rel', value: 1e-3 });
    expect(survey.expectation.complete).toBe(true);
  });

  test('says that it is a least figure where a country’s total is unknown', () => {
    const world = boxWorld([{ code: 'AA', west: 0, south: -10, east: 20, north: 10 }]);
    const corridor = corridorOf({ latitudeDeg: 0, longitudeDeg: -5 }, 90, 'small', LONGEST_RANGE);
    const survey = surveyCorridor(world, corridor, {
      placeDensity: 1.5e-3,
      spreads: true,
      casualtyAreas: REMEMBERED_CASUALTY_AREAS.small,
    });
    expect(survey.expectation).toMatchObject({ spread: 0, complete: false });
    expect(survey.corridor.spread?.unknownLand).toBeGreaterThan(1e12);
  });
});

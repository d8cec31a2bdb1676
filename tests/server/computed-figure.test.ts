import { describe, expect, test } from 'vitest';
import type { FlownOrbit, OrbitResult } from '#contract/evaluate.ts';
import { flownOrbit, type FlownState } from '#contract/flown-results.ts';
import { QUANTITIES, QUANTITY_KEYS, type QuantityKey } from '#contract/quantity.ts';
import { computedFigure } from '#server/ranking/computed-figure.ts';

/* Expected figures are read off the invented results below by the rules of section 1 of the decision analysis. */

const direct: FlownOrbit = {
  code: 'LOW',
  inclinationDeg: 28,
  way: 'direct',
  branch: 'northerly',
  profile: 'direct',
  injectionSpeedMps: 7_800,
  inertialAzimuthDeg: 90,
  launchAzimuthDeg: 90,
  requiredSpeedMps: 7_400,
  rotationGainMps: 400,
  turnDeg: 0,
  planeChangeDeg: 0,
  deltaVMps: {
    required: 7_400,
    losses: 1_500,
    dogleg: 0,
    planeChange: 0,
    transfer: 120,
    reserve: 80,
    total: 9_100,
  },
  payloadKg: 5_000,
  shortfallMps: null,
  others: [],
};
const turned: FlownOrbit = {
  ...direct,
  code: 'SSO',
  inclinationDeg: 97,
  way: 'dogleg',
  requiredSpeedMps: 7_900,
  rotationGainMps: -60,
  turnDeg: 12,
  deltaVMps: {
    ...direct.deltaVMps,
    required: 7_900,
    dogleg: 300,
    planeChange: 50,
    transfer: 40,
    total: 9_870,
  },
  payloadKg: 1_200,
};
const short: FlownOrbit = { ...turned, code: 'GTO', payloadKg: null, shortfallMps: 812.4 };
const far: OrbitResult = {
  code: 'FAR',
  inclinationDeg: 3,
  way: 'out-of-reach',
  branch: null,
  profile: null,
  injectionSpeedMps: null,
  inertialAzimuthDeg: null,
  launchAzimuthDeg: null,
  requiredSpeedMps: null,
  rotationGainMps: null,
  turnDeg: null,
  planeChangeDeg: null,
  deltaVMps: {
    required: null,
    losses: null,
    dogleg: null,
    planeChange: null,
    transfer: null,
    reserve: null,
    total: null,
  },
  payloadKg: null,
  shortfallMps: null,
  others: [],
};

const figure = (quantity: QuantityKey, orbits: readonly OrbitResult[], orbitIndex: number | null = null) =>
  computedFigure({ quantity }, orbitIndex, {
    result: {
      code: 'TH',
      rotationSpeedMps: 465.1,
      geocentricLatitudeDeg: 0,
      payloadPerYearKg: 6_000,
      orbits: [...orbits],
    },
    lowestInclinationDeg: 5.2,
    flightsPerYear: orbits.map(() => 1),
  });

test.each<[QuantityKey, number, number]>([
  ['delta-v', 9_100, 9_870],
  ['required-speed', 7_400, 7_900],
  ['losses', 1_500, 1_500],
  ['turn-cost', 0, 350],
  ['dogleg', 0, 300],
  ['plane-change', 0, 50],
  ['transfer', 120, 120],
  ['shortfall', 0, 0],
  ['rotation-gain', 400, -60],
  ['turn', 0, 12],
])('%s: one orbit’s own, and the worst of the manifest', (quantity, ofFirst, ofAll) => {
  expect(figure(quantity, [direct, turned], 0)).toEqual({ cell: ofFirst });
  expect(figure(quantity, [direct, turned])).toEqual({ cell: ofAll });
});

describe('an orbit that gives no payload is no missing value', () => {
  const lines = QUANTITY_KEYS.filter((key) => QUANTITIES[key].scope === 'either' && key !== 'shortfall');

  test.each(lines)('%s takes the worst level, and says why', (quantity) => {
    expect(figure(quantity, [direct, far])).toEqual({ cell: 'worst', note: 'FAR out of reach' });
    expect(figure(quantity, [far], 0)).toEqual({ cell: 'worst', note: 'out of reach' });
    expect(figure(quantity, [short, direct])).toEqual({ cell: 'worst', note: 'GTO falls short by 813 m/s' });
  });

  test('payload is 0, and the shortfall is a figure where there is one', () => {
    expect(figure('payload', [short], 0)).toEqual({ cell: 0, note: 'falls short by 813 m/s' });
    expect(figure('payload', [far], 0)).toEqual({ cell: 0, note: 'out of reach' });
    expect(figure('shortfall', [direct, short])).toEqual({ cell: 812.4 });
    expect(figure('shortfall', [short, far])).toEqual({ cell: 'worst', note: 'FAR out of reach' });
  });

  test('orbits are counted out of reach, and without payload', () => {
    expect(figure('orbits-out-of-reach', [direct, short, far])).toEqual({ cell: 1 });
    expect(figure('orbits-fallen-short', [direct, short, far])).toEqual({ cell: 2 });
  });
});

test('without a vehicle what needs one is missing, with the reason; the rest is not', () => {
  const bare = { ...direct, payloadKg: null };
  for (const quantity of ['payload', 'shortfall', 'orbits-fallen-short'] as const)
    expect(figure(quantity, [bare], quantity === 'payload' ? 0 : null)).toEqual({
      cell: null,
      note: 'no vehicle yet',
    });
  expect(figure('delta-v', [bare])).toEqual({ cell: 9_100 });
});

test('without orbits only the site’s own figures are there', () => {
  const there = QUANTITY_KEYS.filter((key) => figure(key, []).cell !== null);
  expect(there).toEqual(['rotation-speed', 'lowest-inclination']);
  expect(figure('rotation-speed', [direct])).toEqual({ cell: 465.1 });
});

describe('with losses of flown ascents', () => {
  const asFlown = (
    quantity: QuantityKey,
    states: readonly FlownState[],
    payloadPerYearKg: number | null = 6_000,
  ) =>
    computedFigure({ quantity }, null, {
      result: {
        code: 'TH',
        rotationSpeedMps: 465.1,
        geocentricLatitudeDeg: 0,
        payloadPerYearKg,
        orbits: states.map((state, at) => flownOrbit(at === 0 ? direct : turned, state)),
      },
      states,
      lowestInclinationDeg: 5.2,
      flightsPerYear: states.map(() => 1),
    });
  const none: FlownState = { kind: 'none', reason: 'falls-short' };
  const pending: FlownState = { kind: 'pending' };

  test('what is not flown yet is missing, not worst, and says so', () => {
    const untold = { cell: null, note: 'not flown yet' };
    for (const quantity of ['delta-v', 'losses', 'shortfall', 'orbits-fallen-short'] as const)
      expect(asFlown(quantity, [pending, pending]), quantity).toEqual(untold);
    expect(asFlown('payload-per-year', [pending, pending], null)).toEqual(untold);
    // The closed form knows these without an ascent.
    expect(asFlown('turn', [pending, pending])).toEqual({ cell: 12 });
    expect(asFlown('transfer', [pending, pending])).toEqual({ cell: 120 });
  });

  test('an ascent that carries nothing counts as the worst, with its reason', () => {
    expect(asFlown('delta-v', [none])).toEqual({ cell: 'worst', note: 'falls short' });
    expect(asFlown('payload-per-year', [none, pending], 0)).toEqual({ cell: 0, note: 'LOW counted as 0' });
    expect(asFlown('orbits-fallen-short', [none, none])).toEqual({ cell: 2 });
  });
});

import { expect, test } from 'vitest';
import type { FlownOrbit, SiteResult } from '#contract/evaluate.ts';
import { flownOrbit, flownSite, type FlownState } from '#contract/flown-results.ts';

/* Expected figures are worked by hand from the invented ones: ideal = relative speed + losses − centrifugal gain. */

const closed: FlownOrbit = {
  code: 'LOW',
  inclinationDeg: 28,
  way: 'dogleg',
  branch: 'northerly',
  profile: 'parking',
  injectionSpeedMps: 7_800,
  inertialAzimuthDeg: 90,
  launchAzimuthDeg: 90,
  requiredSpeedMps: 7_400,
  rotationGainMps: 400,
  turnDeg: 4,
  planeChangeDeg: 0,
  deltaVMps: {
    required: 7_400,
    losses: 1_400,
    dogleg: 300,
    planeChange: 20,
    transfer: 120,
    reserve: 60,
    total: 9_300,
  },
  payloadKg: 5_000,
  shortfallMps: null,
  others: [],
};
const flown: FlownState = {
  kind: 'flown',
  figures: {
    converged: true,
    reason: null,
    payloadKg: 4_600,
    flownInclinationDeg: 28,
    burnOutS: 520,
    launchHeadingDeg: 91,
    maxDynamicPressurePa: 34_000,
    // 7,390 + 1,250 + 60 + 150 + 90 − 15
    idealDeltaVMps: 8_925,
    relativeSpeedMps: 7_390,
    centrifugalMps: 15,
    lossesMps: { gravity: 1_250, drag: 60, steering: 150, backPressure: 90 },
    remainderMps: -13,
  },
};

test('losses are what the ideal Δv holds beyond the required speed, and the dogleg is flown within them', () => {
  const { deltaVMps, payloadKg, shortfallMps } = flownOrbit(closed, flown);
  // Required: 7,390 + 13 = 7,403; losses: 1,250 + 60 + 150 + 90 − 15 − 13 = 1,522.
  expect(deltaVMps).toEqual({
    required: 7_403,
    losses: 1_522,
    dogleg: 0,
    planeChange: 20,
    transfer: 120,
    reserve: 60,
    total: 9_125,
  });
  expect([payloadKg, shortfallMps]).toEqual([4_600, null]);
});

test('payload a year waits for what is flown each year, and counts what carries nothing as 0', () => {
  const result: SiteResult = {
    code: 'A',
    rotationSpeedMps: 460,
    geocentricLatitudeDeg: 7,
    payloadPerYearKg: 99_999,
    orbits: [closed, { ...closed, code: 'SSO' }],
  };
  const none: FlownState = { kind: 'none', reason: 'falls-short' };
  const pending: FlownState = { kind: 'pending' };
  expect(flownSite(result, [flown, none], [3, 2]).payloadPerYearKg).toBe(13_800);
  expect(flownSite(result, [flown, pending], [3, 2]).payloadPerYearKg).toBeNull();
  expect(flownSite(result, [flown, pending], [3, 0]).payloadPerYearKg).toBe(13_800);
  expect(flownSite(result, [none, none], [3, 2]).orbits[0]).toMatchObject({
    payloadKg: null,
    shortfallMps: null,
  });
});

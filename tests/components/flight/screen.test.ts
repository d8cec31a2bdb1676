import { describe, expect, test } from 'vitest';
import { budgetParts, budgetScale } from '#components/flight/budget.ts';
import { manifestFinding, orbitFinding } from '#components/flight/finding.ts';
import { gainCurve } from '#components/flight/gain-curves.ts';
import { roseMarks } from '#components/flight/rose-marks.ts';
import type { FlightRow } from '#components/flight/rows.ts';
import type { FlownOrbit, OrbitResult } from '#contract/evaluate.ts';
import type { InputOrbit, InputSite } from '#contract/study-inputs.ts';

const site = (code: string, latitudeDeg: number, sectors: [number, number][] = []): InputSite => ({
  siteId: `00000000-0000-7000-8000-0000000000${code}`,
  code,
  name: `Site ${code}`,
  latitudeDeg,
  longitudeDeg: 0,
  elevationM: 0,
  permittedAzimuthsDeg: sectors,
});

const orbit: InputOrbit = {
  orbitId: '00000000-0000-7000-8000-000000000001',
  code: 'O1',
  name: 'Station supply',
  perigeeKm: 420,
  apogeeKm: 420,
  inclinationDeg: 51.6,
  profile: 'auto',
  parkingKm: 185,
  flightsPerYear: 4,
};

const flown = (fields: Partial<FlownOrbit> = {}): FlownOrbit => ({
  code: 'O1',
  inclinationDeg: 51.6,
  way: 'direct',
  branch: 'northerly',
  profile: 'parking',
  injectionSpeedMps: 7793,
  inertialAzimuthDeg: 40,
  launchAzimuthDeg: 36,
  requiredSpeedMps: 7513,
  rotationGainMps: 280,
  turnDeg: 0,
  planeChangeDeg: 0,
  deltaVMps: {
    required: 7513,
    losses: 1400,
    dogleg: 0,
    planeChange: 0,
    transfer: 134,
    reserve: 60,
    total: 9107,
  },
  payloadKg: 8948,
  shortfallMps: null,
  others: [],
  ...fields,
});

const outOfReach: OrbitResult = {
  code: 'O1',
  inclinationDeg: 51.6,
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

const row = (code: string, latitudeDeg: number, result: OrbitResult): FlightRow => ({
  site: site(code, latitudeDeg),
  result,
});

describe('the finding of an orbit', () => {
  test('says that sites gain about the same, and why latitude pays', () => {
    const { heading, why } = orbitFinding(
      [row('AA', 2, flown()), row('BB', 48, flown({ rotationGainMps: 288 }))],
      51.6,
    );
    expect(heading).toBe('To 51.6° every site gains about the same.');
    expect(why).toContain('gives 280 to 288 m/s, at 2° of latitude as at 48°');
  });

  test('claims no like gain for a site whose turn makes it fly elsewhere', () => {
    const turned = flown({ way: 'plane-change', planeChangeDeg: 25, rotationGainMps: 190 });
    const { heading } = orbitFinding(
      [row('AA', 2, flown()), row('BB', 5, flown()), row('CC', 65, turned)],
      51.6,
    );
    expect(heading).toBe('To 51.6° every direct flight gains about the same. Turns set sites apart.');
  });

  test('names the largest turn with what it costs, and what is out of reach', () => {
    const dogleg = flown({ way: 'dogleg', turnDeg: 8, payloadKg: 6778 });
    dogleg.deltaVMps = { ...dogleg.deltaVMps, dogleg: 654 };
    const rows = [
      row('AA', 2, flown()),
      row('BB', 5, flown()),
      row('CC', 15, dogleg),
      row('DD', 70, outOfReach),
    ];
    const { heading, decides } = orbitFinding(rows, 51.6);
    expect(heading).toMatch(/Turns set them apart\.$/);
    expect(decides).toBe(
      'Site CC owes the largest turn: its dogleg costs 654 m/s and 2,170 kg. Site DD is out of reach: the turn would be over 60°.',
    );
  });

  test('gains that differ are given as a range, and none at all is said', () => {
    const spread = [row('AA', 0, flown()), row('BB', 40, flown({ rotationGainMps: 200 }))];
    expect(orbitFinding(spread, 51.6).heading).toBe('To 51.6° the turning Earth gives 200 to 280 m/s.');
    expect(orbitFinding([row('DD', 70, outOfReach)], 51.6).heading).toBe(
      'No site flies 51.6° without a turn.',
    );
  });

  test('a retrograde orbit costs', () => {
    const rows = [1, 2].map((i) => row(`A${i}`, i, flown({ rotationGainMps: -70 - i })));
    expect(orbitFinding(rows, 97.8).why).toContain('the turning Earth costs 71 to 72 m/s');
  });
});

test('the manifest’s finding names who carries most and what flies nowhere', () => {
  const rows = [
    { site: site('AA', 2), results: [flown(), outOfReach], payloadPerYearKg: 35_792 },
    { site: site('BB', 9), results: [flown(), outOfReach], payloadPerYearKg: 31_000 },
  ];
  const polar = { ...orbit, code: 'O2', name: 'Polar' };
  const { heading, why, decides } = manifestFinding(rows, [orbit, polar]);
  expect(heading).toBe('Site AA carries the most: 35.8 t a year.');
  expect(why).toContain('Site BB follows with 31.0 t.');
  expect(decides).toBe('No site has payload to Polar.');
});

describe('the budget bars', () => {
  test('their parts add up to the total', () => {
    const parts = budgetParts(flown(), { gravity: 1310, drag: 60, steering: 30 });
    expect(parts.reduce((sum, { mps }) => sum + mps, 0)).toBeCloseTo(flown().deltaVMps.total, 9);
  });

  test('the axis begins below every required speed and leaves far totals off the scale', () => {
    const far = flown();
    far.deltaVMps = { ...far.deltaVMps, planeChange: 9000, total: 18_107 };
    const scale = budgetScale([flown(), far]);
    expect(scale.low).toBe(7000);
    expect(scale.high).toBe(12_000);
    expect(scale.ticks.at(-1)).toBe(12_000);
  });

  test('nothing flown still gives an axis', () => {
    expect(budgetScale([outOfReach])).toMatchObject({ low: 7000, high: 10_000 });
  });
});

describe('the rose', () => {
  // 28.5° handed to a site becomes φ′ 28.34°, so the azimuth lies a little off the 42.76° of the plain formula.
  // [derived] v = 7,784.262 m/s, i = 51.6°: reference tables of launch azimuths.
  test('gives both answers, and marks what the sectors shut', () => {
    const of = { orbit, result: flown({ launchAzimuthDeg: 42.68 }), injectionSpeedMps: 7784.262 };
    const marks = roseMarks(site('AA', 28.5, [[20, 100]]), [of], 'O1');
    expect(marks.map(({ kind }) => kind)).toEqual(['permitted', 'not-permitted']);
    expect(marks[0]?.azimuthDeg).toBeCloseTo(42.6, 0);
    expect((marks[0]?.azimuthDeg ?? 0) + (marks[1]?.azimuthDeg ?? 0)).toBeCloseTo(180, 9);
  });

  test('draws the leg flown beside the answers it replaces', () => {
    const of = {
      orbit,
      result: flown({ way: 'dogleg', turnDeg: 8, launchAzimuthDeg: 46 }),
      injectionSpeedMps: 7793,
    };
    const marks = roseMarks(site('AA', -14.97, [[46, 112]]), [of], 'O1');
    expect(marks.find(({ kind }) => kind === 'flown')).toMatchObject({
      azimuthDeg: 46,
      words: 'flown, then a dogleg to 51.6°',
    });
  });
});

describe('the gain curve', () => {
  test('is nearly level near ω a cos i and ends where the inclination equals the latitude', () => {
    // [derived] ω a cos 51.6° = 288.9 m/s (WGS 84), the first-order gain of every site.
    const { points, endDeg } = gainCurve(51.6, 7793.152, 75);
    for (const [, gain] of points) expect(Math.abs(gain - 288.9)).toBeLessThan(9.5);
    // Geodetic latitude whose geocentric one is 51.6°: a tenth and a half of a degree further.
    expect(endDeg).toBeGreaterThan(51.7);
    expect(endDeg).toBeLessThan(51.85);
  });

  test('of a polar orbit runs through', () => {
    expect(gainCurve(90, 7793.152, 75).endDeg).toBeNull();
  });
});

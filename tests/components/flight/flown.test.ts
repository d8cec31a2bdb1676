import { describe, expect, test } from 'vitest';
import { eventsOf } from '#components/flight/flown/events.ts';
import { flownManifestFinding, flownOrbitFinding } from '#components/flight/flown/finding.ts';
import { pathOf, placesAt } from '#components/flight/flown/path.ts';
import { limitsOf, momentAt, momentsOf } from '#components/flight/flown/profile.ts';
import { accountOf, flownRows, flownYears } from '#components/flight/flown/results.ts';
import { progressOf, reasonInWords, stateInWords, timeLeft } from '#components/flight/flown/words.ts';
import { NoAscentReason, type TrajectoryPoint } from '#contract/ascent.ts';
import type { AscentFigures } from '#contract/ascent-job.ts';
import type { StudyAscent } from '#contract/study-ascents.ts';
import type { InputOrbit, InputSite } from '#contract/study-inputs.ts';
import { VehicleInput } from '#contract/vehicle.ts';

const id = (n: number): string => `00000000-0000-7000-8000-${String(n).padStart(12, '0')}`;

const site = (n: number): InputSite => ({
  siteId: id(n),
  code: `S${n}`,
  name: `Site ${n}`,
  latitudeDeg: 0,
  longitudeDeg: 0,
  elevationM: 0,
  permittedAzimuthsDeg: [],
});

const orbit = (n: number, flightsPerYear: number): InputOrbit => ({
  orbitId: id(100 + n),
  code: `O${n}`,
  name: `Orbit ${n}`,
  perigeeKm: 500,
  apogeeKm: 500,
  inclinationDeg: 51.6,
  profile: 'auto',
  parkingKm: 185,
  flightsPerYear,
});

const figures = (payloadKg: number): AscentFigures => ({
  converged: true,
  reason: null,
  payloadKg,
  flownInclinationDeg: 51.6,
  burnOutS: 500,
  launchHeadingDeg: 40,
  maxDynamicPressurePa: 40_000,
  idealDeltaVMps: 8_787,
  relativeSpeedMps: 7_339,
  centrifugalMps: 5,
  lossesMps: { gravity: 1_291, drag: 61, steering: 22, backPressure: 79 },
  remainderMps: -13,
});

const none = (reason: NoAscentReason): AscentFigures => ({
  converged: false,
  reason,
  payloadKg: null,
  flownInclinationDeg: null,
  burnOutS: null,
  launchHeadingDeg: null,
  maxDynamicPressurePa: null,
  idealDeltaVMps: null,
  relativeSpeedMps: null,
  centrifugalMps: null,
  lossesMps: null,
  remainderMps: null,
});

const ascent = (siteN: number, orbitN: number, fields: Partial<StudyAscent> = {}): StudyAscent => ({
  siteId: id(siteN),
  orbitId: id(100 + orbitN),
  state: 'current',
  reason: null,
  requestedBy: null,
  requestedAt: null,
  figures: figures(1_000 * siteN),
  figuresAreStale: false,
  flownAt: null,
  hash: null,
  ...fields,
});

const point = (timeS: number, fields: Partial<TrajectoryPoint> = {}): TrajectoryPoint => ({
  timeS,
  latitudeDeg: 0,
  longitudeDeg: 0,
  altitudeM: 0,
  relativeSpeedMps: 0,
  flightPathDeg: 90,
  headingDeg: 90,
  massKg: 1_000,
  dynamicPressurePa: 0,
  accelerationMps2: 0,
  impact: { kind: 'orbit' },
  ...fields,
});

const vehicle = VehicleInput.parse({
  fairingKg: 100,
  fairingLeavesAfterStage: 1,
  lossesMps: { gravity: 1, drag: 1, steering: 1 },
  boosters: { count: 2, dryKg: 300, propellantKg: 1_000, thrustVacKn: 100, ispVacS: 280 },
  stages: [
    { dryKg: 900, propellantKg: 9_000, thrustVacKn: 200, ispVacS: 300 },
    { dryKg: 200, propellantKg: 2_000, thrustVacKn: 20, ispVacS: 340 },
  ],
  ascent: { maxDynamicPressurePa: 50_000 },
});

describe('what is said of a flight', () => {
  test('every reason of the interface has words of its own', () => {
    const words = NoAscentReason.options.map(reasonInWords);
    expect(new Set(words).size).toBe(NoAscentReason.options.length);
    expect(words).not.toContain(reasonInWords('anything else'));
  });

  test('a current figure needs no words, and a stale one says what it is of', () => {
    expect(stateInWords(ascent(1, 1))).toBe('');
    expect(stateInWords(ascent(1, 1, { figures: none('falls-short') }))).toBe(
      'Falls short of the orbit even without payload.',
    );
    expect(stateInWords(ascent(1, 1, { state: 'stale', figuresAreStale: true }))).toBe(
      'Inputs changed since; figures of the inputs before.',
    );
    expect(stateInWords(ascent(1, 1, { state: 'flying', figuresAreStale: true }))).toBe(
      'Being flown. Inputs changed since; figures of the inputs before.',
    );
    expect(stateInWords(ascent(1, 1, { state: 'failed', reason: 'out of memory', figures: null }))).toContain(
      'out of memory',
    );
  });

  test('progress counts what is asked for, and what is open', () => {
    const counts = { current: 10, stale: 3, waiting: 4, flying: 1, failed: 2, cancelled: 1, missing: 5 };
    expect(progressOf(counts)).toEqual({ underWay: 5, done: 12, asked: 17, open: 11, all: 26 });
    expect([null, 0, 0.4, 8, 41, 200].map(timeLeft)).toEqual([
      'the time left is not known yet',
      'the time left is not known yet',
      'about 1 s left',
      'about 8 s left',
      'about 45 s left',
      'about 4 min left',
    ]);
  });
});

describe('what is drawn of a flight', () => {
  const points = [
    point(0, { massKg: 12_000 }),
    point(60, { massKg: 9_000, dynamicPressurePa: 30_000, altitudeM: 10_000 }),
    point(100, { massKg: 7_000, altitudeM: 30_000, accelerationMps2: 40 }),
    // A clock's rounding between the two.
    point(100 - 1e-14, { massKg: 6_400, altitudeM: 30_000, accelerationMps2: 20 }),
    point(150, { massKg: 5_000 }),
    point(150, { massKg: 4_000 }),
    point(200, { massKg: 3_000 }),
    point(200, { massKg: 2_988 }),
    point(300, { massKg: 2_988 }),
    point(400, { massKg: 1_500 }),
  ];

  test('events come from the flight, and parts are named by their mass', () => {
    expect(eventsOf(points, vehicle).map(({ words }) => words)).toEqual([
      'greatest pressure',
      'boosters part',
      'stage 1 parts, fairing leaves',
      '12 kg left behind',
      'engine off',
      'engine on again',
      'injection',
    ]);
    expect(eventsOf([], vehicle)).toEqual([]);
  });

  test('a moment lies straight between its points, after what was left behind at it', () => {
    const moments = momentsOf(points);
    expect(momentAt(moments, 30)?.altitudeKm).toBe(5);
    expect(momentAt(moments, 100)?.accelerationMps2).toBeCloseTo(20, 9);
    expect(momentAt(moments, 1e6)?.timeS).toBe(400);
    expect(momentAt([], 10)).toBeUndefined();
  });

  test('downrange is the geodesic: a degree along the equator is 111.319 km', () => {
    // [derived] WGS 84: the equator is a geodesic, a degree of it π a / 180 = 111,319.491 m with a = 6,378,137 m.
    const [, far] = momentsOf([point(0), point(10, { longitudeDeg: 1 })]);
    expect(far?.downrangeKm).toBeCloseTo((Math.PI * 6_378.137) / 180, 6);
  });

  test('limits are those the vehicle says, in the charts’ units', () => {
    expect(limitsOf(vehicle)).toEqual({ pressureKpa: 50 });
    expect(limitsOf(null)).toEqual({});
  });

  test('a path across the date line does not jump, and ends where nothing would come down', () => {
    const path = pathOf([
      point(0, {
        longitudeDeg: 179,
        impact: { kind: 'impact', latitudeDeg: 1, longitudeDeg: 179, timeS: 9 },
      }),
      point(10, {
        longitudeDeg: -179,
        impact: { kind: 'impact', latitudeDeg: 3, longitudeDeg: -177, timeS: 99 },
      }),
      point(20, { longitudeDeg: -175 }),
    ]);
    expect(path.ground.map(([longitude]) => longitude)).toEqual([179, 181, 185]);
    expect(placesAt(path, 5)).toEqual({ vehicle: [180, 0], impact: [181, 2] });
    expect(placesAt(path, 15)).toEqual({ vehicle: [183, 0], impact: null });
  });
});

describe('results', () => {
  test('the lines of an account add up to the ideal Δv', () => {
    const sum = accountOf(figures(1));
    expect(sum?.parts.reduce((a, b) => a + b, 0)).toBe(sum?.total);
    expect(accountOf(none('did-not-converge'))).toBeUndefined();
  });

  test('rows: payload first, then flown without, then not flown; of the orbit asked for alone', () => {
    const ascents = [
      ascent(1, 1),
      ascent(2, 1),
      ascent(3, 1, { figures: none('falls-short') }),
      ascent(4, 2),
    ];
    const rows = flownRows([1, 2, 3, 4].map(site), ascents, id(101));
    expect(rows.map((row) => row.site.code)).toEqual(['S2', 'S1', 'S3', 'S4']);
    expect(rows.at(-1)?.ascent).toBeUndefined();
  });

  test('a year stands once every orbit is flown, and one without payload counts zero', () => {
    const orbits = [orbit(1, 2), orbit(2, 3)];
    const years = flownYears([1, 2, 3].map(site), orbits, [
      ascent(1, 1),
      ascent(1, 2, { figures: none('out-of-reach') }),
      ascent(2, 1),
      ascent(2, 2),
      ascent(3, 1),
    ]);
    expect(years.map(({ site: of, payloadPerYearKg }) => [of.code, payloadPerYearKg])).toEqual([
      ['S2', 10_000],
      ['S1', 2_000],
      ['S3', null],
    ]);
    expect(flownManifestFinding(years).heading).toBe(
      'Whole manifest, flown: Site 2 carries most, 10.0 t a year.',
    );
    expect(flownManifestFinding(years).decides).toBe('1 ascent not flown yet.');
  });

  test('the finding names who carries most, or that nothing was flown', () => {
    const rows = flownRows(
      [1, 2].map(site),
      [ascent(1, 1), ascent(2, 1, { figuresAreStale: true })],
      id(101),
    );
    const finding = flownOrbitFinding(rows, 'Polar');
    expect(finding.heading).toBe('Polar, flown: Site 2 carries most, 2,000 kg.');
    expect(finding.why).toContain('Site 1 carries least of those that reach it, 1,000 kg less.');
    expect(finding.decides).toBe('1 figure is of inputs that changed since.');
    const missing = flownRows([site(1)], [ascent(1, 1, { state: 'missing', figures: null })], id(101));
    expect(flownOrbitFinding(missing, 'Polar').heading).toBe('Polar: no ascent has been flown yet.');
  });
});

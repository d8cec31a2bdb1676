import { describe, expect, test } from 'vitest';
import { EvaluateInput, EvaluateOutput } from '#contract/evaluate.ts';
import { evaluate } from '#contract/flights.ts';

const site = { code: 'A', latitudeDeg: 7.42, longitudeDeg: -58.35 };
const orbit = { code: 'O1', perigeeKm: 500, apogeeKm: 500, inclinationDeg: 51.6 };
const engine = { dryKg: 1000, propellantKg: 9000, thrustVacKn: 200, ispVacS: 310 };
const vehicle = {
  lossesMps: { gravity: 1200, drag: 120, steering: 80 },
  stages: [
    { ...engine, propellantKg: 120_000, dryKg: 9000, thrustVacKn: 2200, ispSeaLevelS: 283 },
    { ...engine, propellantKg: 24_000, dryKg: 1800, ispVacS: 345 },
  ],
};

/** The dotted paths of what does not fit. */
function refused(change: Record<string, unknown>): string[] {
  const result = EvaluateInput.safeParse({ sites: [site], orbits: [orbit], vehicle, ...change });
  return result.success ? [] : result.error.issues.map(({ path }) => path.join('.'));
}

describe('what an evaluation takes', () => {
  test('what may be left out is filled in', () => {
    const input = EvaluateInput.parse({ sites: [site], orbits: [orbit] });
    expect(input.sites[0]).toMatchObject({ elevationM: 0, permittedAzimuthsDeg: [] });
    expect(input.orbits[0]).toMatchObject({ profile: 'auto', parkingKm: 185, flightsPerYear: 0 });
    expect(input).toMatchObject({ settings: { turnSpeedFraction: 0.6 }, others: true });
    expect(
      EvaluateInput.parse({ sites: [site], orbits: [orbit], settings: {} }).settings.turnSpeedFraction,
    ).toBe(0.6);
  });

  test('a vehicle of the library may be posted as it is', () => {
    const library = {
      ...vehicle,
      code: 'FINCH-L',
      boosters: { count: 2, ...engine, referenceAreaM2: 1.2 },
      ascent: { referenceAreaM2: 9.1, dragCoefficient: 0.4 },
    };
    expect(refused({ vehicle: library })).toEqual([]);
  });

  test.each([
    ['an unknown key', { sites: [{ ...site, height: 3 }] }, 'sites.0'],
    ['a longitude beyond 180', { sites: [{ ...site, longitudeDeg: 190 }] }, 'sites.0.longitudeDeg'],
    ['a latitude that is text', { sites: [{ ...site, latitudeDeg: '7' }] }, 'sites.0.latitudeDeg'],
    ['a code twice', { sites: [site, site] }, 'sites.1.code'],
    ['an empty code', { orbits: [{ ...orbit, code: '' }] }, 'orbits.0.code'],
    [
      'a bound beyond 360',
      { sites: [{ ...site, permittedAzimuthsDeg: [[10, 361]] }] },
      'sites.0.permittedAzimuthsDeg.0.1',
    ],
    [
      'from = to',
      { sites: [{ ...site, permittedAzimuthsDeg: [[30, 30]] }] },
      'sites.0.permittedAzimuthsDeg.0',
    ],
    [
      '360 to 0',
      { sites: [{ ...site, permittedAzimuthsDeg: [[360, 0]] }] },
      'sites.0.permittedAzimuthsDeg.0',
    ],
    [
      '13 sectors',
      {
        sites: [
          { ...site, permittedAzimuthsDeg: Array.from({ length: 13 }, (_, k) => [k * 20, k * 20 + 9]) },
        ],
      },
      'sites.0.permittedAzimuthsDeg',
    ],
    ['a perigee above the apogee', { orbits: [{ ...orbit, perigeeKm: 600 }] }, 'orbits.0.perigeeKm'],
    ['no inclination', { orbits: [{ ...orbit, inclinationDeg: undefined }] }, 'orbits.0.inclinationDeg'],
    ['both', { orbits: [{ ...orbit, sunSynchronous: true }] }, 'orbits.0.inclinationDeg'],
    [
      'no sun-synchronous inclination',
      { orbits: [{ code: 'O1', perigeeKm: 7000, apogeeKm: 7000, sunSynchronous: true }] },
      'orbits.0.sunSynchronous',
    ],
    ['direct above the parking altitude', { orbits: [{ ...orbit, profile: 'direct' }] }, 'orbits.0.profile'],
    [
      'parking above the apogee',
      { orbits: [{ ...orbit, profile: 'parking', parkingKm: 600 }] },
      'orbits.0.parkingKm',
    ],
    [
      'boosters that outlast the core',
      { vehicle: { ...vehicle, boosters: { count: 2, ...engine, propellantKg: 90_000 } } },
      'vehicle.boosters',
    ],
    [
      'a fairing that leaves after a third stage',
      { vehicle: { ...vehicle, fairingLeavesAfterStage: 3 } },
      'vehicle.fairingLeavesAfterStage',
    ],
  ])('%s is refused', (_, change, path) => {
    expect(refused(change)).toEqual([path]);
  });

  test('−180 is 180, and [0, 360] is all round', () => {
    const input = EvaluateInput.parse({
      sites: [{ ...site, longitudeDeg: -180, permittedAzimuthsDeg: [[0, 360]] }],
      orbits: [orbit],
    });
    expect(input.sites[0]?.longitudeDeg).toBe(180);
  });

  test('20,000 results a call, 100,000 without the ways not taken', () => {
    const list = (count: number) => Array.from({ length: count }, (_, k) => ({ ...site, code: `S${k}` }));
    expect(refused({ sites: list(20_000) })).toEqual([]);
    expect(refused({ sites: list(20_001) })).toEqual(['sites']);
    expect(refused({ sites: list(20_001), others: false })).toEqual([]);
  });
});

describe('what an evaluation gives', () => {
  const run = (change: Record<string, unknown> = {}) => {
    const input = EvaluateInput.parse({ sites: [site], orbits: [orbit], vehicle, ...change });
    const output = EvaluateOutput.parse({ sites: evaluate(input) });
    const [first] = output.sites;
    if (!first) throw new Error('one site');
    return first;
  };

  test('a way flown, with the ways not taken and the lines that sum to the total', () => {
    const result = run({ orbits: [{ ...orbit, flightsPerYear: 4 }] });
    const [flight] = result.orbits;
    if (!flight || flight.way === 'out-of-reach') throw new Error('it is in reach');
    const { total, ...lines } = flight.deltaVMps;
    expect(total).toBeWithin(
      Object.values(lines).reduce((sum, line) => sum + line, 0),
      1e-9,
    );
    expect(lines.losses).toBe(1400);
    expect(flight).toMatchObject({ code: 'O1', inclinationDeg: 51.6, way: 'direct', branch: 'northerly' });
    expect(flight.others.map(({ branch }) => branch)).toEqual(['southerly']);
    expect(result.payloadPerYearKg).toBeWithin(4 * (flight.payloadKg ?? NaN), 1e-9);
    // ω N cos φ of WGS 84 between the published 463.1996 m/s at 5.2° and 451.9534 m/s at 13.7°.
    expect(result.rotationSpeedMps).toBeGreaterThan(451.9534);
    expect(result.rotationSpeedMps).toBeLessThan(463.1996);
  });

  test('without a vehicle no losses, no reserve and no payload', () => {
    const result = run({ vehicle: undefined });
    expect(result.payloadPerYearKg).toBeNull();
    expect(result.orbits[0]).toMatchObject({
      payloadKg: null,
      shortfallMps: null,
      deltaVMps: { losses: 0, reserve: 0 },
    });
  });

  test('out of reach has null for every number but the inclination', () => {
    const [flight] = run({
      sites: [{ ...site, latitudeDeg: 80 }],
      orbits: [{ ...orbit, inclinationDeg: 5 }],
    }).orbits;
    if (!flight) throw new Error('one orbit');
    const { code, way, inclinationDeg, others, deltaVMps, ...rest } = flight;
    expect({ code, way, inclinationDeg, others }).toEqual({
      code: 'O1',
      way: 'out-of-reach',
      inclinationDeg: 5,
      others: [],
    });
    expect(new Set([...Object.values(rest), ...Object.values(deltaVMps)])).toEqual(new Set([null]));
  });

  test('a vehicle that falls short carries nothing and says by how much', () => {
    const small = { ...vehicle, lossesMps: { gravity: 9000, drag: 0, steering: 0 } };
    const [flight] = run({ vehicle: small, orbits: [{ ...orbit, flightsPerYear: 3 }] }).orbits;
    expect(flight?.payloadKg).toBeNull();
    expect(flight?.shortfallMps).toBeGreaterThan(0);
    expect(run({ vehicle: small }).payloadPerYearKg).toBe(0);
  });

  test('"others": false leaves out the ways not taken and changes nothing else', () => {
    const change = { sites: [{ ...site, permittedAzimuthsDeg: [[80, 120]] }] };
    const [whole, chosen] = [run(change), run({ ...change, others: false })];
    expect(whole.orbits[0]?.others.length).toBeGreaterThan(0);
    expect(chosen).toEqual({
      ...whole,
      orbits: whole.orbits.map((flight) => ({ ...flight, others: [] })),
    });
  });
});

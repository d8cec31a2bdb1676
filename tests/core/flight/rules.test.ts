import { describe, expect, test } from 'vitest';
import { evaluateFlight } from '#core/flight/index.ts';
import type { Flown, TargetOrbit } from '#core/flight/index.ts';
import { meridianOf } from '#core/flight/earth.ts';
import { fromDegrees, metres, toDegrees } from '#core/units.ts';
import { orbitOf, SETTINGS, siteAt } from '#tests/support/flights.ts';

type Sectors = readonly (readonly [number, number])[];

const fly = (latitude: number, orbit: TargetOrbit, sectors: Sectors = []) =>
  evaluateFlight(siteAt(latitude, sectors), orbit, null, SETTINGS);

function flown(latitude: number, orbit: TargetOrbit, sectors: Sectors = []): Flown {
  const flight = fly(latitude, orbit, sectors);
  if (flight.kind === 'out-of-reach') throw new Error('it is in reach');
  return flight;
}

const geocentricDeg = (latitude: number) =>
  toDegrees(meridianOf(fromDegrees(latitude), metres(0)).geocentricLatitude);
const circular = (inclination: number) => orbitOf(185, 185, inclination, 'direct');

describe('poles', () => {
  test.each([90, -90])(
    'from %f° a polar orbit is flown north or south, with nothing from the Earth',
    (latitude) => {
      const flight = flown(latitude, circular(90));
      expect([flight.kind, flight.inertialAzimuth, flight.launchAzimuth]).toEqual(['direct', 0, 0]);
      expect(flight.others.map(({ launchAzimuth }) => launchAzimuth)).toEqual([Math.PI]);
      expect(flight.rotationGain).toBeWithin(0, 1e-9);
    },
  );

  test('any other inclination owes its distance from 90°', () => {
    const flight = flown(90, circular(51.6));
    expect([flight.kind, toDegrees(flight.launchAzimuth)]).toEqual(['plane-change', 90]);
    expect(toDegrees(flight.planeChange)).toBeWithin(38.4, 1e-9);
    expect(toDegrees(flown(90, circular(98)).launchAzimuth)).toBe(270);
  });

  test('29° is 61° away, and out of reach', () => {
    const flight = fly(90, circular(29));
    if (flight.kind !== 'out-of-reach') throw new Error('it is out of reach');
    expect(toDegrees(flight.nearestInclination)).toBeWithin(90, 1e-9);
  });
});

describe('the equator', () => {
  test('due east for 0°, due west for 180°, each the one answer', () => {
    const [east, west] = [flown(0, circular(0)), flown(0, circular(180))];
    expect([east.kind, toDegrees(east.launchAzimuth), east.others.length]).toEqual(['direct', 90, 0]);
    expect([west.kind, toDegrees(west.launchAzimuth), west.others.length]).toEqual(['direct', 270, 0]);
    // ω a = 465.1011 m/s, WGS 84.
    expect(east.rotationGain).toBeWithin(465.1011, 5e-5);
    expect(west.rotationGain).toBeWithin(-465.1011, 5e-5);
  });

  test('a polar orbit is aimed west of north to cancel the turning Earth', () => {
    const flight = flown(0, circular(90));
    expect(flight.inertialAzimuth).toBe(0);
    expect(Math.tan(flight.launchAzimuth)).toBeWithin(-465.1011 / flight.injectionSpeed, 1e-7);
  });
});

describe('reach', () => {
  test('the site’s own geocentric latitude is reached due east, and its supplement due west', () => {
    for (const latitude of [5.2, 28.5, -45, 62.9, 89]) {
      const lowest = Math.abs(geocentricDeg(latitude));
      const east = flown(latitude, circular(lowest));
      expect([east.kind, toDegrees(east.launchAzimuth), east.others.length]).toEqual(['direct', 90, 0]);
      const west = flown(latitude, circular(180 - lowest));
      expect([west.kind, toDegrees(west.launchAzimuth), west.others.length]).toEqual(['direct', 270, 0]);
    }
  });

  test('a lower inclination is flown due east, and the rest is owed', () => {
    const flight = flown(28.5, circular(20));
    expect([flight.kind, toDegrees(flight.launchAzimuth)]).toEqual(['plane-change', 90]);
    expect(toDegrees(flight.planeChange)).toBeWithin(geocentricDeg(28.5) - 20, 1e-9);
    const v = flight.injectionSpeed;
    expect(flight.budget.planeChange).toBeWithin(2 * v * Math.sin(flight.planeChange / 2), 1e-6);
  });

  test('60° owed is still flown; a hair more is out of reach', () => {
    const lowest = geocentricDeg(70);
    expect(fly(70, circular(lowest - 60)).kind).toBe('plane-change');
    expect(fly(70, circular(lowest - 60 - 1e-6)).kind).toBe('out-of-reach');
  });

  test('due east permitted but owing more than 60° leaves the edges unused', () => {
    expect(fly(70, circular(0), [[80, 100]]).kind).toBe('out-of-reach');
  });
});

describe('sectors', () => {
  test('the southerly answer is taken where the northerly is not permitted', () => {
    const flight = flown(34.6, circular(98), [[150, 200]]);
    expect([flight.kind, flight.branch]).toEqual(['direct', 'southerly']);
  });

  test('a sector may pass through north, and [0, 360] is all round', () => {
    expect(flown(7, circular(51.6), [[300, 60]]).kind).toBe('direct');
    expect(flown(7, circular(51.6), [[0, 360]]).others).toHaveLength(1);
  });

  test('a bound is forgiven 1e-9° and no more', () => {
    const azimuth = toDegrees(flown(28.5, circular(51.6)).launchAzimuth);
    expect(flown(28.5, circular(51.6), [[azimuth - 5, azimuth - 5e-10]]).kind).toBe('direct');
    expect(flown(28.5, circular(51.6), [[azimuth - 5, azimuth - 2e-9]]).kind).not.toBe('direct');
    expect(flown(28.5, circular(51.6), [[azimuth + 5e-10, azimuth + 5]]).kind).toBe('direct');
  });

  test('where no answer is permitted each edge is flown both ways, edges that meet once', () => {
    const flight = flown(28.5, circular(51.6), [
      [60, 90],
      [90, 110],
    ]);
    const azimuths = [flight, ...flight.others].map(({ launchAzimuth }) =>
      Math.round(toDegrees(launchAzimuth)),
    );
    expect(azimuths.sort((a, b) => a - b)).toEqual([60, 60, 90, 90, 110, 110]);
  });

  test('the first leg flies the plane of its own azimuth', () => {
    const flight = flown(28.5, circular(51.6), [[60, 110]]);
    expect([flight.kind, Math.round(toDegrees(flight.launchAzimuth))]).toEqual(['dogleg', 60]);
    // Over the ground 60°: s sin 60° + v_e east and s cos 60° north make up the injection speed.
    const { requiredSpeed: s, injectionSpeed: v, launchAzimuth: b } = flight;
    const east = s * Math.sin(b) + 409.0506;
    expect(Math.hypot(east, s * Math.cos(b))).toBeWithin(v, 1e-3);
    expect(Math.tan(flight.inertialAzimuth)).toBeWithin(east / (s * Math.cos(b)), 1e-6);
  });
});

describe('profiles', () => {
  test('auto takes the cheaper one; the other profile of the same way is not listed', () => {
    const auto = flown(5, orbitOf(185, 35_786, 6));
    const [direct, parking] = (['direct', 'parking'] as const).map((profile) =>
      flown(5, orbitOf(185, 35_786, 6, profile)),
    );
    expect(auto.budget.total).toBe(Math.min(direct?.budget.total ?? NaN, parking?.budget.total ?? NaN));
    expect(auto.others.map(({ branch }) => branch)).toEqual(['southerly']);
  });

  test('a profile that is not allowed is refused', () => {
    expect(() => fly(5, orbitOf(500, 500, 51.6, 'direct'))).toThrow(RangeError);
    expect(() => fly(5, orbitOf(150, 150, 51.6, 'parking'))).toThrow(RangeError);
    expect(() => fly(5, orbitOf(600, 500, 51.6))).toThrow(RangeError);
  });

  test('below the parking altitude auto burns out at perigee', () => {
    expect(flown(5, orbitOf(150, 150, 51.6)).profile).toBe('direct');
    expect(flown(5, orbitOf(500, 500, 51.6)).profile).toBe('parking');
  });
});

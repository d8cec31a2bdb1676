import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { inclinationFlown, inertialAzimuths, launchVector } from '#core/flight/launch-azimuth.ts';
import { lowestInclination } from '#core/flight/lowest-inclination.ts';
import { circularSpeed, radiusOf } from '#core/flight/orbit.ts';
import { padOf } from '#core/flight/pad.ts';
import { isPermitted } from '#core/flight/sectors.ts';
import { fromDegrees, metres, radians, toDegrees } from '#core/units.ts';

const speed = circularSpeed(radiusOf(metres(185_000)));
const padAt = (latitudeDeg: number, ...sectorsDeg: [number, number][]) =>
  padOf({
    latitude: fromDegrees(latitudeDeg),
    longitude: radians(0),
    height: metres(0),
    sectors: sectorsDeg.map(([from, to]) => ({ from: fromDegrees(from), to: fromDegrees(to) })),
  });

describe('lowest inclination flown directly', () => {
  test('is the geocentric latitude where due east is permitted, north or south', () => {
    for (const latitude of [0, 7.42, -28.5, 62]) {
      const pad = padAt(latitude, [80, 120]);
      expect(lowestInclination(pad, speed)).toBeCloseTo(Math.abs(pad.geocentricLatitude), 14);
      expect(lowestInclination(padAt(latitude), speed)).toBeCloseTo(Math.abs(pad.geocentricLatitude), 14);
    }
  });

  test('from the equator due north or south only is all but polar: the turning Earth carries along', () => {
    const carried = Math.acos(padAt(0).rotationSpeed / speed);
    expect(lowestInclination(padAt(0, [0, 1e-9]), speed)).toBeCloseTo(carried, 9);
    expect(toDegrees(radians(carried))).toBeLessThan(90);
  });

  test('no permitted azimuth sampled gives a lower one, and one of them gives it', () => {
    const latitude = fc.double({ min: -85, max: 85, noNaN: true });
    const bound = fc.integer({ min: 0, max: 359 });
    fc.assert(
      fc.property(latitude, bound, fc.integer({ min: 1, max: 200 }), (latitudeDeg, from, width) => {
        const pad = padAt(latitudeDeg, [from, (from + width) % 360]);
        const lowest = lowestInclination(pad, speed);
        let least = Infinity;
        for (let step = 0; step < 3_600; step++) {
          const inertial = fromDegrees(step / 10);
          const { launchAzimuth } = launchVector(inertial, speed, pad.rotationSpeed);
          if (!isPermitted(pad.sectors, launchAzimuth)) continue;
          least = Math.min(least, inclinationFlown(pad.geocentricLatitude, inertial));
        }
        expect(least).toBeGreaterThanOrEqual(lowest - 1e-9);
        expect(least - lowest).toBeLessThan(fromDegrees(0.2));
      }),
      { numRuns: 60 },
    );
  });

  test('an orbit at that inclination is reached along a permitted azimuth', () => {
    const pad = padAt(30, [10, 60]);
    const lowest = lowestInclination(pad, speed);
    const flown = inertialAzimuths(pad.geocentricLatitude, lowest).map(
      (inertial) => launchVector(inertial, speed, pad.rotationSpeed).launchAzimuth,
    );
    expect(flown.some((azimuth) => isPermitted(pad.sectors, azimuth))).toBe(true);
  });
});

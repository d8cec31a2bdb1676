import fc from 'fast-check';
import { describe, expect, test, vi } from 'vitest';
import { between } from '#core/downrange/geodesic.ts';
import { NAUTICAL_MILE as NM, VEHICLE_CLASSES } from '#core/downrange/index.ts';
import { clearance, polarError, radiusBetween } from '#core/downrange/polar.ts';
import { halfWidthAt, shapeOf } from '#core/downrange/shape.ts';
import { ROUGH_ERROR, Strip, directionOf } from '#core/downrange/strip.ts';
import { metres } from '#core/units.ts';
import { SEED } from '#tests/support/flights.ts';

// The whole world is read, and geodesics are many.
vi.setConfig({ testTimeout: 60_000, hookTimeout: 60_000 });

const RADIAN = Math.PI / 180;
const bounded = (min: number, max: number) => fc.double({ min, max, noNaN: true });

/** A flight line and a place known beforehand: laid out from it by geodesics, s along and y square to it. */
const layouts = fc
  .record({
    latitudeDeg: bounded(-89, 89),
    longitudeDeg: bounded(-180, 180),
    azimuthDeg: bounded(0, 360),
    s: bounded(0, 5000 * NM),
    across: bounded(-1, 1),
    vehicleClass: fc.constantFrom(...VEHICLE_CLASSES),
  })
  .map(({ latitudeDeg, longitudeDeg, azimuthDeg, s, across, vehicleClass }) => {
    const strip = new Strip({ latitudeDeg, longitudeDeg }, azimuthDeg);
    const y = across * (200e3 + 0.18 * s);
    return { strip, s, y, place: strip.path.beside(s, y), azimuthDeg, vehicleClass };
  });

describe('strip coordinates', () => {
  test('on the ellipsoid give back what was laid out, to a millimetre', () => {
    fc.assert(
      fc.property(layouts, ({ strip, s, y, place }) => {
        const found = strip.exact(place);
        expect(found.s).toBeWithin(s, 1e-3);
        expect(found.y).toBeWithin(y, 1e-3);
      }),
      { ...SEED, numRuns: 2000 },
    );
  });

  test('on the sphere are off by half of what is allowed for at most', () => {
    fc.assert(
      fc.property(layouts, ({ strip, s, y, place }) => {
        const found = strip.rough(directionOf(place));
        const allowed = ROUGH_ERROR * Math.hypot(s, y) * 0.55 + 1;
        expect(Math.abs(found.s - s)).toBeLessThan(allowed);
        expect(Math.abs(found.y - y)).toBeLessThan(allowed);
      }),
      { ...SEED, numRuns: 5000 },
    );
  });
});

describe('polar points', () => {
  test('tell a place’s distance to the corridor’s side within what is allowed for', () => {
    fc.assert(
      fc.property(layouts, ({ strip, s, y, place, azimuthDeg, vehicleClass }) => {
        const shape = shapeOf(vehicleClass, metres(5000 * NM));
        const sight = between(strip.path.start, place);
        const radius = radiusBetween(strip.up, directionOf(place));
        const turn = (sight.azimuthDeg - azimuthDeg) * RADIAN;
        // Nearer to the corridor's end than its error a place may seem to lie beyond it.
        if (s > shape.range - 20e3) return;
        const truth = halfWidthAt(shape, s) - Math.abs(y);
        expect(clearance(shape, sight.distance, turn, radius)).toBeWithin(truth, polarError(sight.distance));
      }),
      { ...SEED, numRuns: 5000 },
    );
  });
});

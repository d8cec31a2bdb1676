import { describe, expect, test } from 'vitest';
import { constants } from '#core/constants.ts';
import { ECCENTRICITY_SQUARED as e2, meridianOf, POLAR_RADIUS as b } from '#core/flight/earth.ts';
import { fromDegrees, metres, toDegrees } from '#core/units.ts';
import { reference } from '#tests/support/reference.ts';

const a = constants.equatorialRadius.value;
const omega = constants.rotationRate.value;
const mu = constants.gravitationalParameter.value;

interface Place {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly heightM: number;
}

const meridian = ({ latitudeDeg, heightM }: Place) => meridianOf(fromDegrees(latitudeDeg), metres(heightM));

const quantities: Record<string, (place: Place) => number> = {
  'polar radius': () => b,
  'eccentricity squared': () => e2,
  'second eccentricity squared': () => e2 / (1 - e2),
  'polar curvature': () => a ** 2 / b,
  'mean radius': () => (2 * a + b) / 3,
  'gravity ratio': () => (omega ** 2 * a ** 2 * b) / mu,
  'geodetic minus geocentric': (place) =>
    60 * (place.latitudeDeg - toDegrees(meridian(place).geocentricLatitude)),
  'axis distance': (place) => meridian(place).axisDistance / 1000,
  'height over equator': (place) => meridian(place).z / 1000,
  x: (place) => meridian(place).axisDistance * Math.cos(fromDegrees(place.longitudeDeg)),
  z: (place) => meridian(place).z,
  'rotation speed': (place) => meridian(place).rotationSpeed,
  'rotation speed kmh': (place) => meridian(place).rotationSpeed * 3.6,
};

describe('WGS 84 and the speed of the turning Earth', () => {
  test.each(reference('geodesy'))('$id $quantity $latitude_deg', (row) => {
    const place = {
      latitudeDeg: Number(row.latitude_deg),
      longitudeDeg: Number(row.longitude_deg),
      heightM: Number(row.height_m),
    };
    expect(quantities[row.quantity]?.(place) ?? NaN).toBeWithin(row.expected, row.tolerance);
  });
});

import { describe, expect, test } from 'vitest';
import {
  circularSpeed,
  nodeRate,
  periodOf,
  radiusOf,
  shapeOf,
  speedAt,
  sunSynchronousInclination,
} from '#core/flight/orbit.ts';
import { fromDegrees, fromKilometres, metres, toDegrees, radians } from '#core/units.ts';
import { reference } from '#tests/support/reference.ts';

/** Largest radius of a circular sun-synchronous orbit, found by halving between orbits that have one and have none. */
function largestRadius(): number {
  let [low, high] = [5e6, 8e6];
  while (high - low > 1) {
    const middle = metres((low + high) / 2);
    if (sunSynchronousInclination(middle, middle).kind === 'found') low = middle;
    else high = middle;
  }
  return radiusOf(metres(low)) / 1000;
}

/** Radius whose period is one sidereal day, by halving. */
function geostationaryRadius(): number {
  let [low, high] = [4e7, 4.3e7];
  while (high - low > 1e-3) {
    const middle = (low + high) / 2;
    if (periodOf(middle) < 86_164.0905) low = middle;
    else high = middle;
  }
  return low;
}

const orbit: Record<string, (perigeeKm: number, apogeeKm: number) => number> = {
  'circular speed': (perigeeKm) => circularSpeed(radiusOf(fromKilometres(perigeeKm))),
  period: (perigeeKm) => periodOf(radiusOf(fromKilometres(perigeeKm))) / 60,
  'perigee speed': (perigeeKm, apogeeKm) => {
    const shape = shapeOf(fromKilometres(perigeeKm), fromKilometres(apogeeKm));
    return speedAt(shape.perigeeRadius, shape.semiMajorAxis);
  },
  'apogee speed': (perigeeKm, apogeeKm) => {
    const shape = shapeOf(fromKilometres(perigeeKm), fromKilometres(apogeeKm));
    return speedAt(shape.apogeeRadius, shape.semiMajorAxis);
  },
  'geostationary radius': geostationaryRadius,
  // On a circle gravity is all there is to bend the path: g = v²/r.
  gravity: (perigeeKm) => {
    const radius = radiusOf(fromKilometres(perigeeKm));
    return circularSpeed(radius) ** 2 / radius;
  },
};

describe('orbit speeds, periods and gravity with altitude', () => {
  test.each(reference('orbit'))('$id $quantity', (row) => {
    const value = orbit[row.quantity]?.(Number(row.perigee_km), Number(row.apogee_km)) ?? NaN;
    expect(value).toBeWithin(row.expected, row.tolerance);
  });
});

const DAY = 86_400;
const inclination = (km: number) => {
  const found = sunSynchronousInclination(fromKilometres(km), fromKilometres(km));
  return found.kind === 'found' ? toDegrees(found.inclination) : NaN;
};
const sunSynchronous: Record<string, (km: number, inclinationDeg: number) => number> = {
  inclination,
  'largest radius': largestRadius,
  'nodal rate': (km, inclinationDeg) =>
    toDegrees(radians(nodeRate(fromKilometres(km), fromKilometres(km), fromDegrees(inclinationDeg)) * DAY)),
};

describe('sun-synchronous orbits', () => {
  test.each(reference('sun-synchronous'))('$id $quantity', (row) => {
    const value = sunSynchronous[row.quantity]?.(Number(row.perigee_km), Number(row.inclination_deg)) ?? NaN;
    expect(value).toBeWithin(row.expected, row.tolerance);
  });

  test('an ellipse keeps to the Sun where its node turns once a tropical year', () => {
    const [perigee, apogee] = [fromKilometres(300), fromKilometres(3000)];
    const found = sunSynchronousInclination(perigee, apogee);
    if (found.kind === 'none') throw new Error('there is one');
    expect(nodeRate(perigee, apogee, found.inclination) * 365.2421897 * DAY).toBeWithin(2 * Math.PI, 1e-12);
  });
});

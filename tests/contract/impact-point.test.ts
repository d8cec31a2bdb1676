import { expect, test } from 'vitest';
import { ImpactPoint, ImpactPointInput } from '#contract/impact-point.ts';
import { findImpactPoint } from '#server/ascents/find-impact-point.ts';
import { reference } from '#tests/support/reference.ts';

test.each(reference('impact-point').filter(({ quantity }) => quantity === 'longitude'))(
  'over the interface, $heading_deg° from $latitude_deg° comes down at $printed° east',
  (row) => {
    const input = ImpactPointInput.parse({
      latitudeDeg: Number(row.latitude_deg),
      longitudeDeg: Number(row.longitude_deg),
      altitudeM: Number(row.altitude_km) * 1000,
      relativeSpeedMps: Number(row.speed_mps),
      flightPathDeg: Number(row.path_deg),
      headingDeg: Number(row.heading_deg),
    });
    const found = ImpactPoint.parse(findImpactPoint(input));
    expect(found.kind === 'impact' && found.longitudeDeg).toBeWithin(row.expected, row.tolerance);
  },
);

const still = {
  latitudeDeg: 3,
  longitudeDeg: 180,
  altitudeM: 1000,
  relativeSpeedMps: 0,
  flightPathDeg: 0,
  headingDeg: 90,
};

test('a longitude stays between −180 and 180 across the date line', () => {
  // Eastward at 600 m/s from 180°: it comes down beyond the line.
  const found = findImpactPoint(ImpactPointInput.parse({ ...still, relativeSpeedMps: 600 }));
  expect(found.kind === 'impact' && found.longitudeDeg).toBeLessThan(-179);
});

test('below the surface there is none, and orbit has no place', () => {
  expect(findImpactPoint({ ...still, altitudeM: -10 })).toEqual({ kind: 'none' });
  expect(findImpactPoint({ ...still, altitudeM: 400_000, relativeSpeedMps: 7300 })).toEqual({
    kind: 'orbit',
  });
});

test.each([
  ['latitudeDeg', 91],
  ['headingDeg', -1],
  ['flightPathDeg', 90.1],
  ['relativeSpeedMps', -5],
  ['altitudeM', Infinity],
])('%s of %s is refused by name', (field, value) => {
  const parsed = ImpactPointInput.safeParse({ ...still, [field]: value });
  expect(parsed.error?.issues.map(({ path }) => path.join('.'))).toEqual([field]);
});

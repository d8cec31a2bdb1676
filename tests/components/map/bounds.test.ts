import { expect, test } from 'vitest';
import { boundsOf } from '#components/map/bounds.ts';

const at = (longitudeDeg: number, latitudeDeg = 0) => ({ longitudeDeg, latitudeDeg });

test('two places across the date line are framed across it', () => {
  expect(boundsOf([at(178, -17), at(-176, -44)])).toEqual({ west: 178, east: 184, south: -44, north: -17 });
});

test('places on one side keep their own longitudes', () => {
  expect(boundsOf([at(-58), at(-37), at(21)])).toMatchObject({ west: -58, east: 21 });
});

test('one place is a point, none is no box', () => {
  expect(boundsOf([at(145.3, -15)])).toEqual({ west: 145.3, east: 145.3, south: -15, north: -15 });
  expect(boundsOf([])).toBeUndefined();
});

test('places all round the world show it whole', () => {
  expect(
    boundsOf([-170, -130, -90, -50, -10, 30, 70, 110, 150].map((longitude) => at(longitude))),
  ).toMatchObject({
    west: -180,
    east: 180,
  });
});

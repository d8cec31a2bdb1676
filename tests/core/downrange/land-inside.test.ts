import { createRequire } from 'node:module';
import geographicLib from 'geographiclib-geodesic';
import { feature } from 'topojson-client';
import type { GeometryCollection, Topology } from 'topojson-specification';
import { beforeAll, describe, expect, test, vi } from 'vitest';
import { ringArea } from '#core/downrange/area.ts';
import { placed } from '#core/downrange/corridor.ts';
import { NAUTICAL_MILE as NM, between, corridorOf, type Place } from '#core/downrange/index.ts';
import { landInside } from '#core/downrange/land-inside.ts';
import type { LandMap } from '#core/downrange/land-map.ts';
import { corridorOutline } from '#core/downrange/outline.ts';
import { planarRings } from '#core/downrange/planar.ts';
import { metres } from '#core/units.ts';
import { boxWorld, shippedWorld } from '#tests/support/downrange-world.ts';
import { reference } from '#tests/support/reference.ts';

// The whole world is read, and geodesics are many.
vi.setConfig({ testTimeout: 60_000, hookTimeout: 60_000 });

const wgs84 = geographicLib.Geodesic.WGS84;
const THOUSANDTH = { kind: 'rel', value: 1e-3 } as const;
type Ring = readonly (readonly number[])[];

/** Area by GeographicLib's geodesic polygons: Karney's method, independent of core's authalic integral. */
function libraryArea(ring: Ring): number {
  const polygon = wgs84.Polygon(false);
  for (const [longitude = NaN, latitude = NaN] of ring) polygon.AddPoint(latitude, longitude);
  return polygon.Compute(false, true).area ?? NaN;
}

const require = createRequire(import.meta.url);
const atlas = require('world-atlas/countries-10m.json') as Topology<{
  countries: GeometryCollection<{ name: string }>;
}>;

/** A country's rings as the atlas draws them on the sphere, before the date line was cut. */
function atlasArea(name: string): number {
  const found = feature(atlas, atlas.objects.countries).features.find(
    ({ properties }) => properties.name === name,
  );
  const shape = found?.geometry;
  if (shape?.type !== 'Polygon' && shape?.type !== 'MultiPolygon') throw new Error(`no ${name}`);
  const polygons = shape.type === 'Polygon' ? [shape.coordinates] : shape.coordinates;
  // Atlas rings run clockwise, holes the other way round, and repeat their first point.
  return polygons.flat().reduce((sum, ring) => sum - libraryArea(ring.slice(0, -1)), 0);
}

describe('ringArea', () => {
  test('is the library’s for a ring with many points', () => {
    // A thousand points of an ellipse in plane degrees: sides so short that geodesics and straight lines are one.
    const points = Array.from({ length: 20_000 }, (_, at) => {
      const angle = (2 * Math.PI * at) / 20_000;
      return [30 + 20 * Math.cos(angle), 50 + 15 * Math.sin(angle)];
    });
    const units = points.flat().map((degrees) => degrees * 10_000);
    expect(ringArea(units)).toBeWithin(libraryArea(points), { kind: 'rel', value: 1e-6 });
  });

  test('is all of the ellipsoid for the whole plane', () => {
    // 510,065,621.72 km² [from memory: the surface of WGS 84], as two halves; the library's own figure beside it.
    const cells = Array.from({ length: 90 }, (_, row) => {
      const south = -900_000 + row * 20_000;
      return ringArea([
        -1_800_000,
        south,
        1_800_000,
        south,
        1_800_000,
        south + 20_000,
        -1_800_000,
        south + 20_000,
      ]);
    });
    const total = cells.reduce((sum, area) => sum + area, 0);
    expect(total / 1e6).toBeWithin(510_065_621.72, 0.01);
  });
});

describe('landInside', () => {
  let map: LandMap;
  beforeAll(() => {
    ({ map } = shippedWorld());
  });

  test.each(reference('downrange-data').filter(({ quantity }) => quantity.startsWith('land of ')))(
    '$id: $quantity, as published',
    ({ quantity, expected, tolerance }) => {
      const country = map.data.countries.find(({ code }) => code === quantity.slice(-2));
      expect((country?.land ?? NaN) / 1e6).toBeWithin(expected, tolerance);
    },
  );

  // Fiji and Russia cross the date line, Antarctica holds the pole.
  test.each(['Iceland', 'Madagascar', 'Japan', 'Australia', 'Fiji', 'Kenya', 'Antarctica'])(
    'has the area of %s as the library measures the atlas’s own rings',
    (name) => {
      const code = {
        Iceland: 'IS',
        Madagascar: 'MG',
        Japan: 'JP',
        Australia: 'AU',
        Fiji: 'FJ',
        Kenya: 'KE',
        Antarctica: 'AQ',
      }[name];
      const country = map.data.countries.find((one) => one.code === code);
      expect(country?.land).toBeWithin(atlasArea(name), THOUSANDTH);
    },
  );

  test.each([
    ['Iceland', 'IS', { latitudeDeg: 50, longitudeDeg: -70 }, { latitudeDeg: 64.9, longitudeDeg: -18.6 }],
    ['Madagascar', 'MG', { latitudeDeg: -20, longitudeDeg: -20 }, { latitudeDeg: -19.5, longitudeDeg: 46.5 }],
  ] as const)('holds all of %s where the corridor goes right over it', (name, code, start, middle) => {
    const azimuth = between(start, middle).azimuthDeg;
    const corridor = corridorOf(start, azimuth, 'small', metres(5000 * NM));
    const lands = landInside(map, planarRings(placed(corridor, corridorOutline(corridor.shape))));
    const found = lands.find(({ country }) => map.country(country).code === code);
    expect(found?.area).toBeWithin(atlasArea(name), THOUSANDTH);
  });

  const everywhere = boxWorld([{ code: 'AA', west: -180, south: -90, east: 180, north: 90 }]);
  const launches: readonly (readonly [string, Place, number])[] = [
    ['far from both', { latitudeDeg: 10, longitudeDeg: 3 }, 75],
    ['across the date line', { latitudeDeg: -39, longitudeDeg: 178 }, 80],
    ['over the North Pole', { latitudeDeg: 62, longitudeDeg: 20 }, 0],
    ['over the South Pole', { latitudeDeg: -50, longitudeDeg: 179 }, 182],
    ['from a pole', { latitudeDeg: -90, longitudeDeg: 0 }, 10],
  ];

  test.each(launches)('is the whole corridor where all is land: %s', (_, start, azimuth) => {
    const corridor = corridorOf(start, azimuth, 'large', metres(5000 * NM));
    const ring = placed(corridor, corridorOutline(corridor.shape));
    const [land] = landInside(everywhere.map, planarRings(ring));
    expect(land?.area).toBeWithin(libraryArea(ring), THOUSANDTH);
  });

  test('is half of the corridor where the land’s edge runs along the flight line', () => {
    const north = boxWorld([{ code: 'AA', west: -180, south: 0, east: 180, north: 90 }]);
    const corridor = corridorOf({ latitudeDeg: 0, longitudeDeg: 150 }, 90, 'small', metres(5000 * NM));
    const ring = placed(corridor, corridorOutline(corridor.shape));
    const [land] = landInside(north.map, planarRings(ring));
    expect(land?.area).toBeWithin(libraryArea(ring) / 2, THOUSANDTH);
  });

  test('finds nothing at sea', () => {
    const island = boxWorld([{ code: 'AA', west: 100, south: 40, east: 101, north: 41 }]);
    const corridor = corridorOf({ latitudeDeg: 0, longitudeDeg: -150 }, 90, 'small', metres(5000 * NM));
    expect(landInside(island.map, planarRings(placed(corridor, corridorOutline(corridor.shape))))).toEqual(
      [],
    );
  });
});

import { createRequire } from 'node:module';
import { geoContains } from 'd3-geo';
import geographicLib from 'geographiclib-geodesic';
import { feature } from 'topojson-client';
import type { GeometryCollection, Topology } from 'topojson-specification';
import { beforeAll, describe, expect, test, vi } from 'vitest';
import { GeodesicPath } from '#core/downrange/geodesic.ts';
import { NAUTICAL_MILE as NM, type World } from '#core/downrange/index.ts';
import { firstLand, landAlong } from '#core/downrange/path-over-land.ts';
import { boxWorld, shippedWorld } from '#tests/support/downrange-world.ts';

// The whole world is read, and geodesics are many.
vi.setConfig({ testTimeout: 60_000, hookTimeout: 60_000 });

const { Geodesic } = geographicLib;
const RANGE = 5000 * NM;

describe('landAlong', () => {
  const ring = boxWorld([
    { code: 'AA', west: -180, south: -5, east: -170, north: 5 },
    { code: 'AB', west: 170, south: -5, east: 180, north: 5 },
    { code: 'AC', west: -90, south: -5, east: -80, north: 5 },
  ]);

  test('follows the equator over the date line without a tear', () => {
    // A degree of the equator is a π/180 = 111,319.491 m.
    const degree = (6_378_137 * Math.PI) / 180;
    const path = new GeodesicPath({ latitudeDeg: 0, longitudeDeg: 160 }, 90);
    const found = [...landAlong(ring.map, path, 60 * degree)];
    expect(found.map(({ country }) => ring.map.country(country).code)).toEqual(['AB', 'AA']);
    [10, 20, 20, 30].forEach((degrees, at) => {
      const stretch = found[at >> 1];
      expect(at % 2 === 0 ? stretch?.from : stretch?.to).toBeWithin(degrees * degree, 0.1);
    });
    const back = new GeodesicPath({ latitudeDeg: 0, longitudeDeg: -160 }, 270);
    expect([...landAlong(ring.map, back, 60 * degree)].map(({ country }) => country)).toEqual([0, 1]);
  });

  test('passes over a pole of land', () => {
    const cap = boxWorld([{ code: 'AQ', west: -180, south: -90, east: 180, north: -70 }]);
    const path = new GeodesicPath({ latitudeDeg: -60, longitudeDeg: 33 }, 180);
    const [stretch, ...more] = landAlong(cap.map, path, RANGE);
    expect(more).toEqual([]);
    const across = Geodesic.WGS84.Inverse(-70, 33, -70, -147, Geodesic.DISTANCE).s12 ?? NaN;
    expect((stretch?.to ?? NaN) - (stretch?.from ?? NaN)).toBeWithin(across, 1);
  });

  test('tells the launch point’s own land from the first land', () => {
    const shores = boxWorld([
      { code: 'AA', west: -20, south: -5, east: 0, north: 5 },
      { code: 'AB', west: 10, south: -5, east: 20, north: 5 },
    ]);
    const degree = (6_378_137 * Math.PI) / 180;
    const from = (longitudeDeg: number) =>
      firstLand(shores.map, new GeodesicPath({ latitudeDeg: 0, longitudeDeg }, 90), RANGE, 2000);
    expect(from(-3).coast).toBeWithin(3 * degree, 0.1);
    expect(from(-3).land?.distance).toBeWithin(13 * degree, 0.1);
    // A pad drawn 1 km off its own coast stands on it all the same.
    expect(from(-20 - 1000 / degree).land?.distance).toBeWithin(30 * degree + 1000, 0.1);
    expect(from(30)).toEqual({ coast: 0, land: null });
    const all = boxWorld([{ code: 'AA', west: -180, south: -90, east: 180, north: 90 }]);
    const inland = firstLand(
      all.map,
      new GeodesicPath({ latitudeDeg: 10, longitudeDeg: 0 }, 70),
      RANGE,
      2000,
    );
    expect(inland).toEqual({ coast: null, land: null });
  });
});

describe('landAlong the shipped world', () => {
  const require = createRequire(import.meta.url);
  const atlas = require('world-atlas/land-50m.json') as Topology<{ land: GeometryCollection }>;
  const land = feature(atlas, atlas.objects.land);
  let world: World;
  beforeAll(() => {
    world = shippedWorld();
  });

  // d3's spherical point-in-polygon on the 1:50 million land, every 80 km: another data set's generalisation and
  // another method. Coarser coasts differ here and there; 97 in 100 places must agree.
  test.each([
    [{ latitudeDeg: 28, longitudeDeg: -80 }, 45],
    [{ latitudeDeg: -39, longitudeDeg: 178 }, 300],
    [{ latitudeDeg: 64, longitudeDeg: 180 }, 250],
    [{ latitudeDeg: 70, longitudeDeg: 20 }, 0],
  ])(
    'is land where d3 finds land, from %o at %s°',
    (start, azimuth) => {
      const path = new GeodesicPath(start, azimuth);
      const stretches = [...landAlong(world.map, path, 8e6)];
      const places = Array.from({ length: 100 }, (_, at) => (at + 0.5) * 80e3);
      const agree = places.filter((s) => {
        const { longitudeDeg, latitudeDeg } = path.at(s);
        const ours = stretches.some(({ from, to }) => s >= from && s < to);
        return ours === geoContains(land, [longitudeDeg, latitudeDeg]);
      });
      expect(agree.length / places.length).toBeGreaterThan(0.97);
    },
    60_000,
  );
});

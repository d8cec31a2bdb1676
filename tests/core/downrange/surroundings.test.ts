import geographicLib from 'geographiclib-geodesic';
import { beforeAll, describe, expect, test, vi } from 'vitest';
import { surroundingsOf, type World } from '#core/downrange/index.ts';
import { nearestCoast } from '#core/downrange/coast.ts';
import { boxWorld, shippedWorld } from '#tests/support/downrange-world.ts';

// The whole world is read, and geodesics are many.
vi.setConfig({ testTimeout: 60_000, hookTimeout: 60_000 });

const { Geodesic } = geographicLib;
const DENSITY = 1500 / 1e6;
const apart = (a: readonly [number, number], b: readonly [number, number]): number =>
  Geodesic.WGS84.Inverse(a[0], a[1], b[0], b[1], Geodesic.DISTANCE).s12 ?? NaN;

describe('surroundings in the shipped world', () => {
  let world: World;
  beforeAll(() => {
    world = shippedWorld();
  });

  // Every settlement in turn by GeographicLib's inverse problem, no index and no sphere.
  test.each([
    [28.5, -80.6],
    [51.9, 4.5],
    [-17, 179.6],
    [78.5, 16],
  ])(
    'count as brute force does, about %s, %s',
    (latitudeDeg, longitudeDeg) => {
      const { settlements } = world;
      const all = Array.from({ length: settlements.count }, (_, at) => ({
        at,
        people: settlements.people(at),
        place: settlements.place(at),
      }))
        // Nobody farther than 60° of latitude is among the nearest here; it spares half of the work.
        .filter(({ place }) => Math.abs(place.latitudeDeg - latitudeDeg) < 40)
        .map((one) => ({
          ...one,
          distance: apart([latitudeDeg, longitudeDeg], [one.place.latitudeDeg, one.place.longitudeDeg]),
        }));
      const found = surroundingsOf(world, { latitudeDeg, longitudeDeg }, null);
      for (const { radius, settlements: count, people, withoutFigure } of found.within) {
        const inside = all.filter(({ distance }) => distance <= radius);
        expect(count).toBe(inside.length);
        expect(people).toBe(inside.reduce((sum, one) => sum + one.people, 0));
        expect(withoutFigure).toBe(inside.filter((one) => one.people === 0).length);
      }
      for (const { people, settlement, distance } of found.nearest) {
        const best = all
          .filter((one) => one.people >= people)
          .reduce((a, b) => (b.distance < a.distance ? b : a));
        expect(settlement).toBe(best.at);
        expect(distance).toBeWithin(best.distance, 1e-6);
      }
    },
    60_000,
  );
});

describe('surroundings by geometry', () => {
  const island = boxWorld(
    [
      { code: 'AA', west: 178.1, south: -1.9, east: 180, north: 1.9, people: 1e6 },
      { code: 'AB', west: -180, south: -1.9, east: -178.1, north: 1.9, people: 1e6 },
    ],
    [
      [0.3, 179.99, 5000, 'AA'],
      [0, -179.5, 250_000, 'AA'],
    ],
  );

  test('spread people over a circle across the date line', () => {
    const found = surroundingsOf(island, { latitudeDeg: 0, longitudeDeg: 180 }, DENSITY);
    // π r² on a sphere of the mean radius, 2πR²(1 − cos r/R), of the island's even density; the circle is a polygon of
    // 180 sides, 0.02 % less, and the ellipsoid's degree at the equator 0.5 % off the sphere's.
    const area = 2 * Math.PI * 6_371_009 ** 2 * (1 - Math.cos(100e3 / 6_371_009));
    const land = island.map.data.countries.reduce((sum, country) => sum + country.land, 0);
    const own = 255_000 / DENSITY;
    const remaining = 2e6 - 255_000;
    const within = found.within.at(-1);
    expect(within).toMatchObject({ settlements: 2, people: 255_000, withoutFigure: 0 });
    expect(within?.spread?.people).toBeWithin((remaining / (land - own)) * (area - own), {
      kind: 'rel',
      value: 0.1,
    });
    expect(found.onLand).toBe(true);
  });

  test('find the coast where it lies', () => {
    const coast = nearestCoast(island.map, { latitudeDeg: 0.5, longitudeDeg: 179.9 });
    // The shore at 1.9° N is nearer than those to the east and west, by the geodesic library.
    expect(coast?.distance).toBeWithin(apart([0.5, 179.9], [1.9, 179.9]), 3000);
    expect(coast?.place.latitudeDeg).toBe(1.9);
    const sea = nearestCoast(island.map, { latitudeDeg: 0.5, longitudeDeg: 170 });
    expect(sea?.distance).toBeWithin(apart([0.5, 170], [0.5, 178.1]), 3000);
    expect(sea?.place.longitudeDeg).toBe(178.1);
  });

  test('know no coast where there is none, and no settlement of a size that none has', () => {
    const all = boxWorld([{ code: 'AA', west: -180, south: -90, east: 180, north: 90 }], [[1, 1, 20, 'AA']]);
    const found = surroundingsOf(all, { latitudeDeg: 0, longitudeDeg: 0 }, null);
    expect(found.coast).toBeNull();
    expect(found.nearest.every(({ settlement }) => settlement === null)).toBe(true);
  });
});

import { beforeAll, describe, expect, test, vi } from 'vitest';
import { NAUTICAL_MILE as NM, corridorOf, type Place, type World } from '#core/downrange/index.ts';
import { decodeSettlements, encodeSettlements } from '#core/downrange/data/settlement-data.ts';
import { inCorridor } from '#core/downrange/shape.ts';
import { surroundingsOf } from '#core/downrange/surroundings.ts';
import { metres } from '#core/units.ts';
import { shippedWorld } from '#tests/support/downrange-world.ts';
import { reference } from '#tests/support/reference.ts';

// The whole world is read, and geodesics are many.
vi.setConfig({ testTimeout: 60_000, hookTimeout: 60_000 });

let world: World;
beforeAll(() => {
  world = shippedWorld();
});

describe('the gazetteer as shipped', () => {
  const counts = reference('downrange-data').filter(({ unit }) => unit !== 'km^2');

  test.each(counts)('$id: $quantity', ({ quantity, latitude_deg, longitude_deg, expected, tolerance }) => {
    const { people } = world.settlements.data;
    const place = { latitudeDeg: Number(latitude_deg), longitudeDeg: Number(longitude_deg) };
    const near = () => surroundingsOf(world, place, null).within.at(-1);
    const answers: Readonly<Record<string, () => number | undefined>> = {
      settlements: () => people.length,
      people: () => people.reduce((sum, one) => sum + one, 0),
      'without figure': () => people.filter((one) => one === 0).length,
      largest: () => people.reduce((most, one) => Math.max(most, one), 0),
      'settlements within 100 km': () => near()?.settlements,
      'people within 100 km': () => near()?.people,
      'total of people of the world': () =>
        world.map.data.countries.reduce((sum, country) => sum + (country.people ?? 0), 0),
    };
    expect(answers[quantity]?.()).toBeWithin(expected, tolerance);
  });

  test('comes back from its file as it went in', () => {
    const { data } = world.settlements;
    const back = decodeSettlements(encodeSettlements(data));
    const bytes = (column: ArrayBufferView): Buffer =>
      Buffer.from(column.buffer, column.byteOffset, column.byteLength);
    for (const column of ['latitudesDeg', 'longitudesDeg', 'people', 'countries'] as const)
      expect(bytes(back[column]).equals(bytes(data[column]))).toBe(true);
    expect(back.names.join('\n') === data.names.join('\n')).toBe(true);
    expect(back.countryCodes).toEqual(data.countryCodes);
  });
});

describe('settlements inside a corridor', () => {
  const launches: readonly (readonly [Place, number])[] = [
    [{ latitudeDeg: 5, longitudeDeg: -52 }, 90],
    [{ latitudeDeg: 28, longitudeDeg: -80 }, 75],
    [{ latitudeDeg: 65, longitudeDeg: 20 }, 0],
    [{ latitudeDeg: -39, longitudeDeg: 178 }, 95],
    [{ latitudeDeg: 35, longitudeDeg: 139 }, 80],
    [{ latitudeDeg: 80, longitudeDeg: 0 }, 10],
    [{ latitudeDeg: 20, longitudeDeg: 72 }, 200],
    [{ latitudeDeg: 90, longitudeDeg: 0 }, 60],
  ];

  // Every settlement in turn, its place in the strip worked out on the ellipsoid, no index and no sphere.
  test.each(launches)(
    'are those of a brute-force count, from %o at %s°',
    (start, azimuth) => {
      const corridor = corridorOf(start, azimuth, 'medium', metres(5000 * NM));
      const { settlements } = world;
      const brute: number[] = [];
      for (let at = 0; at < settlements.count; at += 1) {
        const { s, y } = corridor.strip.rough(settlements.direction(at));
        // So far out on the sphere no place can be inside on the ellipsoid, and its foot need not be sought.
        if (s < -100e3 || s > 9.5e6 || Math.abs(y) > 300e3 + 0.2 * Math.max(0, s)) continue;
        const exact = corridor.strip.exact(settlements.place(at));
        if (inCorridor(corridor.shape, exact.s, exact.y)) brute.push(at);
      }
      expect(settlements.inside(corridor)).toEqual(brute);
      expect(brute.length).toBeGreaterThan(0);
    },
    30_000,
  );
});

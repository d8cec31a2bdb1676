import { beforeAll, describe, expect, test, vi } from 'vitest';
import {
  AZIMUTHS,
  NAUTICAL_MILE as NM,
  azimuthFan,
  corridorOf,
  inclinationsOpened,
  openSectors,
  openWidth,
  surveyCorridor,
  REMEMBERED_CASUALTY_AREAS,
  type Spoke,
  type World,
} from '#core/downrange/index.ts';
import { isExcluded } from '#core/downrange/corridor.ts';
import { padOf } from '#core/flight/index.ts';
import { fromDegrees, metres, metresPerSecond, radians, toDegrees } from '#core/units.ts';
import { boxWorld, shippedWorld, uniforms } from '#tests/support/downrange-world.ts';

// The whole world is read, and geodesics are many.
vi.setConfig({ testTimeout: 60_000, hookTimeout: 60_000 });

const DENSITY = 1500 / 1e6;
const RANGE = metres(5000 * NM);

describe('a fan over the shipped world', () => {
  let world: World;
  beforeAll(() => {
    world = shippedWorld();
  });

  test.each([
    [{ latitudeDeg: 28.5, longitudeDeg: -80.6 }, RANGE],
    [{ latitudeDeg: -39, longitudeDeg: 178 }, RANGE],
    [{ latitudeDeg: 68, longitudeDeg: 21 }, metres(1500 * NM)],
  ] as const)(
    'counts the people of the corridors taken one by one, from %o',
    (start, range) => {
      const fan = azimuthFan(world, start, 'large', range, DENSITY);
      expect(fan.map(({ azimuthDeg }) => azimuthDeg)).toEqual(
        Array.from({ length: AZIMUTHS }, (_, at) => at),
      );
      for (let azimuthDeg = 0; azimuthDeg < AZIMUTHS; azimuthDeg += 24) {
        const corridor = corridorOf(start, azimuthDeg, 'large', range);
        const inside = world.settlements.inside(corridor);
        const excluded = inside.filter((at) => isExcluded(corridor, world.settlements.place(at)));
        expect(fan[azimuthDeg]).toMatchObject({
          people: world.settlements.sum(inside).people,
          settlements: inside.length,
          withoutFigure: world.settlements.sum(inside).withoutFigure,
          excludedPeople: world.settlements.sum(excluded).people,
          excludedSettlements: excluded.length,
        });
      }
    },
    60_000,
  );

  test('spreads people as the corridors do, within some per cent', () => {
    const start = { latitudeDeg: 7.42, longitudeDeg: -58.35 };
    const fan = azimuthFan(world, start, 'small', RANGE, DENSITY);
    const settings = { placeDensity: DENSITY, spreads: true, casualtyAreas: REMEMBERED_CASUALTY_AREAS.small };
    for (const azimuthDeg of [30, 75, 180, 250, 330]) {
      const survey = surveyCorridor(world, corridorOf(start, azimuthDeg, 'small', RANGE), settings);
      const whole = survey.corridor.spread?.people ?? NaN;
      expect(fan[azimuthDeg]?.spread?.people).toBeWithin(whole, Math.max(0.05 * whole, 2e5));
      expect(fan[azimuthDeg]?.first).toEqual(survey.first);
    }
    expect(azimuthFan(world, start, 'small', RANGE, null).every(({ spread }) => spread === null)).toBe(true);
  });
});

/**
 * A coast that mirrors itself in a meridian, with mirrored settlements, and a launch point on the meridian. The
 * settlements are of a country without land, so that both halves of a split one are spread over alike.
 */
function mirrored(longitudeDeg: number): World {
  const random = uniforms(11);
  const next = () => random.next().value;
  const wrap = (degrees: number) =>
    degrees > 180 ? degrees - 360 : degrees <= -180 ? degrees + 360 : degrees;
  const places = Array.from({ length: 300 }, () => {
    const [latitude, off, people] = [next() * 70 - 10, next() * 60, Math.floor(next() * 1e5) + 1];
    return [1, -1].map((side) => [latitude, wrap(longitudeDeg + side * off), people, 'ZZ'] as const);
  }).flat();
  const box = { code: 'AA', south: 14, north: 40, people: 5e8 };
  const [west, east] = [wrap(longitudeDeg - 20), wrap(longitudeDeg + 20)];
  return boxWorld(
    west < east
      ? [{ ...box, west, east }]
      : [
          { ...box, west, east: 180 },
          { ...box, code: 'AB', west: -180, east },
        ],
    places,
  );
}

describe('a fan where the coast is symmetric', () => {
  const fanAt = (longitudeDeg: number): Spoke[] =>
    azimuthFan(mirrored(longitudeDeg), { latitudeDeg: 5, longitudeDeg }, 'medium', RANGE, DENSITY);

  test.each([0, -47, 180])(
    'is symmetric, from longitude %s°',
    (longitudeDeg) => {
      const fan = fanAt(longitudeDeg);
      for (let azimuthDeg = 1; azimuthDeg < 180; azimuthDeg += 1) {
        const [right, left] = [fan[azimuthDeg], fan[AZIMUTHS - azimuthDeg]] as [Spoke, Spoke];
        expect([left.people, left.settlements]).toEqual([right.people, right.settlements]);
        if (right.first.land === null) expect(left.first.land).toBeNull();
        else expect(left.first.land?.distance).toBeWithin(right.first.land.distance, 1);
        const spread = right.spread?.people ?? NaN;
        expect(left.spread?.people).toBeWithin(spread, 1e-2 * spread + 1e3);
      }
    },
    60_000,
  );

  test('finds the coast where geometry puts it', () => {
    const fan = fanAt(0);
    // Due north along the meridian the shore at 14° lies 995,378 m from 5°: the meridian's arc on the ellipsoid,
    // a(1 − e²)∫(1 − e² sin²φ)^(−3/2) dφ by Simpson's rule below.
    const arc = (from: number, to: number): number => {
      const radius = (degrees: number) =>
        (6_378_137 * (1 - 0.00669437999014)) /
        (1 - 0.00669437999014 * Math.sin((degrees * Math.PI) / 180) ** 2) ** 1.5;
      const steps = 100;
      const width = (to - from) / steps;
      let sum = radius(from) + radius(to);
      for (let at = 1; at < steps; at += 1) sum += (at % 2 === 1 ? 4 : 2) * radius(from + at * width);
      return (sum * width * Math.PI) / 180 / 3;
    };
    expect(fan[0]?.first).toMatchObject({ coast: 0 });
    expect(fan[0]?.first.land?.distance).toBeWithin(arc(5, 14), 0.1);
    expect(fan[180]?.first).toEqual({ coast: 0, land: null });
  });
});

describe('openSectors', () => {
  const spoke = (azimuthDeg: number, change: Partial<Spoke> = {}): Spoke => ({
    azimuthDeg,
    first: { coast: 0, land: null },
    people: 0,
    settlements: 0,
    withoutFigure: 0,
    spread: null,
    excludedPeople: 0,
    excludedSettlements: 0,
    ...change,
  });
  const fanOf = (change: (azimuthDeg: number) => Partial<Spoke>) =>
    Array.from({ length: 360 }, (_, at) => spoke(at, change(at)));
  const limits = { clearDistance: null, people: 100, exclusionEmpty: true };

  test('run from the first whole degree to the last, through north too', () => {
    const fan = fanOf((at) => ({ people: at >= 95 && at < 342 ? 101 : 100 }));
    expect(openSectors(fan, limits)).toEqual([{ fromDeg: 342, toDeg: 94, complete: true }]);
    expect(openWidth(openSectors(fan, limits))).toBe(112);
  });

  test('are all round or none, and a degree alone makes none', () => {
    expect(
      openSectors(
        fanOf(() => ({})),
        limits,
      ),
    ).toEqual([{ fromDeg: 0, toDeg: 360, complete: true }]);
    expect(openWidth([{ fromDeg: 0, toDeg: 360 }])).toBe(360);
    expect(
      openSectors(
        fanOf(() => ({ people: 101 })),
        limits,
      ),
    ).toEqual([]);
    expect(
      openSectors(
        fanOf((at) => ({ people: at === 50 ? 0 : 101 })),
        limits,
      ),
    ).toEqual([]);
  });

  test('keep each limit that is set, and none that is not', () => {
    const near = { first: { coast: 0, land: { distance: 400e3, country: 0 } } };
    const inland = { first: { coast: null, land: null } };
    const fan = fanOf((at) => {
      if (at < 90) return near;
      if (at < 180) return inland;
      if (at < 270) return { excludedSettlements: 1 };
      return { people: 60, spread: { people: 50, unknownLand: 0 } };
    });
    expect(openSectors(fan, { clearDistance: 500e3, people: null, exclusionEmpty: true })).toEqual([
      { fromDeg: 270, toDeg: 359, complete: true },
    ]);
    expect(openSectors(fan, { clearDistance: 300e3, people: 100, exclusionEmpty: true })).toEqual([
      { fromDeg: 0, toDeg: 89, complete: true },
    ]);
    expect(openSectors(fan, { clearDistance: null, people: null, exclusionEmpty: false })).toEqual([
      { fromDeg: 0, toDeg: 360, complete: true },
    ]);
  });

  test('say where people are unknown', () => {
    const fan = fanOf((at) => {
      if (at === 40) return { withoutFigure: 1, settlements: 1 };
      if (at === 140) return { spread: { people: 1, unknownLand: 5e6 } };
      return { people: at === 90 || at >= 180 ? 101 : 0 };
    });
    expect(openSectors(fan, limits).map(({ complete }) => complete)).toEqual([false, false]);
    const known = fanOf((at) => ({ people: at >= 180 ? 101 : 0, spread: { people: 1, unknownLand: 0 } }));
    expect(openSectors(known, limits)).toEqual([{ fromDeg: 0, toDeg: 179, complete: true }]);
  });
});

describe('inclinationsOpened', () => {
  const pad = padOf({ latitude: fromDegrees(28), longitude: radians(0), height: metres(0), sectors: [] });
  const speed = metresPerSecond(7793);

  test('reach down to the geocentric latitude where due east is open, and up to the steeper edge', () => {
    const [span] = inclinationsOpened(pad, [{ fromDeg: 40, toDeg: 110 }], speed);
    // tan φ′ = (1 − e²) tan φ; cos i = cos φ′ sin β with β from the launch azimuth 40° (SMAD section 6.4).
    const geocentric = Math.atan(0.99330562 * Math.tan((28 * Math.PI) / 180));
    expect(span?.fromDeg).toBeWithin((geocentric * 180) / Math.PI, 1e-6);
    const turning =
      7.292115e-5 *
      (6_378_137 / Math.sqrt(1 - 0.00669437999 * Math.sin((28 * Math.PI) / 180) ** 2)) *
      Math.cos((28 * Math.PI) / 180);
    const [sin, cos] = [Math.sin((40 * Math.PI) / 180), Math.cos((40 * Math.PI) / 180)];
    const required = -turning * sin + Math.sqrt(speed ** 2 - (turning * cos) ** 2);
    const inertial = Math.atan2(required * sin + turning, required * cos);
    const steepest = Math.acos(Math.cos(geocentric) * Math.sin(inertial));
    expect(span?.toDeg).toBeWithin(toDegrees(radians(steepest)), 1e-6);
  });

  test('join where sectors open the same ones, and stay apart where they do not', () => {
    const mirror = inclinationsOpened(
      pad,
      [
        { fromDeg: 40, toDeg: 60 },
        { fromDeg: 120, toDeg: 140 },
      ],
      speed,
    );
    expect(mirror).toHaveLength(1);
    const apart = inclinationsOpened(
      pad,
      [
        { fromDeg: 80, toDeg: 100 },
        { fromDeg: 260, toDeg: 280 },
      ],
      speed,
    );
    expect(apart).toHaveLength(2);
    expect(apart[1]?.toDeg).toBeWithin(180 - (apart[0]?.fromDeg ?? NaN), 1e-9);
    expect(inclinationsOpened(pad, [{ fromDeg: 0, toDeg: 360 }], speed)[0]?.toDeg).toBeGreaterThan(150);
  });
});

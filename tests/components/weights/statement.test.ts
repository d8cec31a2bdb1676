import { describe, expect, test } from 'vitest';
import { evenStatement, fromPresent, missingOf } from '#components/weights/statement.ts';
import { meanShares, pointsOfShares, statementNow, weighing } from '#contract/weighing.ts';
import { pointsStatement, type WeightMethod, type WeightStatement } from '#contract/weights.ts';

const id = (last: string): string => `00000000-0000-7000-8000-0000000000${last}`;
const [COST, TIME, ACCESS, BUSINESS] = [id('c1'), id('c2'), id('c3'), id('d1')];
/** Cost and Time under Business, Access by itself. */
const items = [
  { id: COST, groupId: BUSINESS },
  { id: TIME, groupId: BUSINESS },
  { id: ACCESS, groupId: null },
];
const points = pointsStatement({ [BUSINESS]: 60, [ACCESS]: 20, [COST]: 10, [TIME]: 30 });
const sharesOf = (statement: WeightStatement): number[] => {
  const { shares } = weighing(items, statement);
  return items.map((one) => shares?.[one.id] ?? NaN);
};

describe('a statement by another method from the present weights', () => {
  test.each<WeightMethod>(['points', 'swing'])('%s comes to the same weights', (method) => {
    const made = fromPresent(method, items, points);
    expect(made?.method).toBe(method);
    sharesOf(made ?? points).forEach((share, place) =>
      expect(share).toBeCloseTo([0.1875, 0.5625, 0.25][place] ?? NaN, 12),
    );
  });

  test('swing has 100 in each level', () => {
    const made = fromPresent('swing', items, points)?.points;
    expect(made).toMatchObject({ [BUSINESS]: 100, [TIME]: 100 });
    expect(made?.[COST]).toBeCloseTo(100 / 3, 9);
  });

  test('pairwise takes the nearest whole judgements, an order the falling weights', () => {
    expect(fromPresent('pairwise', items, points)?.judgements).toEqual([
      [BUSINESS, ACCESS, 3],
      [COST, TIME, 1 / 3],
    ]);
    expect(fromPresent('centroid', items, points)?.order).toEqual([BUSINESS, ACCESS, TIME, COST]);
  });

  test('nothing comes of no weights, and no judgement of a weight of 0', () => {
    expect(fromPresent('swing', items, pointsStatement({}))).toBeNull();
    expect(fromPresent('pairwise', items, pointsStatement({ [ACCESS]: 5 }))).toBeNull();
  });
});

describe('what a statement lacks', () => {
  const lacks = (over: Partial<WeightStatement>) => missingOf(items, { ...pointsStatement({}), ...over });

  test('judgements of every pair of a level, and none across levels', () => {
    expect(lacks({ method: 'pairwise' })).toEqual({ count: 2, what: 'judgement' });
    expect(lacks({ method: 'pairwise', judgements: [[COST, TIME, 2]] })?.count).toBe(1);
    expect(
      lacks({
        method: 'pairwise',
        judgements: [
          [COST, TIME, 2],
          [ACCESS, BUSINESS, 2],
        ],
      }),
    ).toBeNull();
  });

  test('a swing of each thing, one of each level at 100', () => {
    expect(lacks({ method: 'swing' })).toEqual({ count: 4, what: 'swing' });
    const given = { [BUSINESS]: 100, [ACCESS]: 0, [COST]: 90, [TIME]: 20 };
    expect(lacks({ method: 'swing', points: given })?.count).toBe(1);
    expect(lacks({ method: 'swing', points: { ...given, [COST]: 100 } })).toBeNull();
  });

  test('a place in the order; points lack nothing', () => {
    expect(lacks({ method: 'centroid', order: [ACCESS, TIME, COST] })?.count).toBe(1);
    expect(lacks({})).toBeNull();
  });
});

describe('weights as points', () => {
  test('equal points give groups an equal part each', () => {
    expect(sharesOf(evenStatement(items))).toEqual([0.25, 0.25, 0.5]);
  });

  test('a mean keeps its weights through groups, and no point passes 100', () => {
    const mean = meanShares(items, [
      { [COST]: 0.1, [TIME]: 0.2, [ACCESS]: 0.7 },
      { [COST]: 0.3, [TIME]: 0.6, [ACCESS]: 0.1 },
    ]);
    expect(mean?.[COST]).toBeCloseTo(0.2, 12);
    const stated = pointsOfShares(items, mean ?? {});
    sharesOf(pointsStatement(stated)).forEach((share, place) =>
      expect(share).toBeCloseTo([0.2, 0.4, 0.4][place] ?? NaN, 12),
    );
    expect(Math.max(...Object.values(stated))).toBeLessThanOrEqual(100);
    expect(meanShares(items, [])).toBeNull();
  });

  test('what a set said of criteria that are gone is not read any more', () => {
    const gone = id('ff');
    const now = statementNow(items, {
      ...points,
      points: { ...points.points, [gone]: 40 },
      order: [gone, COST],
    });
    expect(now.points).toEqual(points.points);
    expect(now.order).toEqual([COST]);
  });
});

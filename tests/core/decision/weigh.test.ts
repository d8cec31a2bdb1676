import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { settled } from '#core/decision/settled.ts';
import {
  missingPairs,
  weigh,
  type Judgement,
  type WeighItem,
  type WeightMethod,
  type WeightStatement,
} from '#core/decision/weigh.ts';
import { weightsFromPoints } from '#core/decision/weights.ts';

/** "a b G:c G:d" as criteria, two of them in the group G. */
const itemsOf = (text: string): WeighItem[] =>
  text.split(' ').map((part) => {
    const [first = '', second] = part.split(':');
    return second === undefined ? { id: first, groupId: null } : { id: second, groupId: first };
  });
const said = (method: WeightMethod, rest: Partial<WeightStatement>): WeightStatement => ({
  method,
  points: {},
  order: [],
  judgements: [],
  ...rest,
});
const weightsOf = (text: string, statement: WeightStatement): number[] => {
  const weighed = weigh(itemsOf(text), statement);
  if (weighed.kind === 'unset') throw new Error('unset');
  return [...weighed.weights];
};
const expectWeights = (got: number[], expected: number[]): void => {
  expect(got).toHaveLength(expected.length);
  expected.forEach((w, j) => expect(got[j]).toBeCloseTo(w, 12));
};

describe('criteria in groups', () => {
  test('points: the group’s weight times the weight within the group', () => {
    // [derived] top: a 60, G 40 of 100; within G: 3 and 1 of 4.
    const points = { a: 60, G: 40, b: 3, c: 1 };
    expectWeights(weightsOf('G:b a G:c', said('points', { points })), [0.3, 0.6, 0.1]);
  });

  test('swing: each level has its own 100', () => {
    // [derived] top: 50 and 100 of 150; within G: 100 and 25 of 125.
    const points = { a: 50, G: 100, b: 100, c: 25 };
    expectWeights(weightsOf('a G:b G:c', said('swing', { points })), [1 / 3, 8 / 15, 2 / 15]);
  });

  test('centroid: each level takes from the order the ids that are its own', () => {
    // [derived] two things 3/4 and 1/4 at the top; within G two more.
    const order = ['c', 'G', 'a', 'b'];
    expectWeights(weightsOf('a G:b G:c', said('centroid', { order })), [0.25, 0.1875, 0.5625]);
  });

  test('pairwise: each level is judged by itself', () => {
    // [derived] consistent: a twice G; b : c : d = 4 : 2 : 1.
    const judgements: Judgement[] = [
      ['a', 'G', 2],
      ['c', 'b', 0.5],
      ['b', 'd', 4],
      ['c', 'd', 2],
    ];
    const got = weightsOf('a G:b G:c G:d', said('pairwise', { judgements }));
    expectWeights(got, [2 / 3, 4 / 21, 2 / 21, 1 / 21]);
  });

  test('a level of one needs no statement, but for one ungrouped criterion without points', () => {
    for (const method of ['points', 'swing', 'pairwise', 'centroid'] as const) {
      expect(weightsOf('G:a', said(method, {}))).toEqual([1]);
      const alone = weigh(itemsOf('a'), said(method, {}));
      expect(alone.kind).toBe(method === 'points' || method === 'swing' ? 'unset' : 'set');
      expect(weightsOf('a', said(method, { points: { a: 40 } }))).toEqual([1]);
    }
  });

  test('a group whose criteria all have 0 counts as 0', () => {
    const points = { a: 30, b: 10, G: 60, c: 0, d: 0 };
    expectWeights(weightsOf('a b G:c G:d', said('points', { points })), [0.75, 0.25, 0, 0]);
    expect(weigh(itemsOf('G:c G:d'), said('points', { points })).kind).toBe('unset');
  });

  test('without groups points weigh as they always have, to the last digit', () => {
    const points = { a: 3, b: 7, c: 11 };
    const given = weightsFromPoints([3, 7, 11]);
    expect(weightsOf('a b c', said('points', { points }))).toEqual([
      ...(given.kind === 'set' ? given.weights : []),
    ]);
  });

  test('no criteria, and nothing said of any, are unset', () => {
    for (const method of ['points', 'swing', 'pairwise', 'centroid'] as const) {
      expect(weigh([], said(method, {})).kind).toBe('unset');
      const { kind, levels } = weigh(itemsOf('a b G:c G:d'), said(method, {}));
      expect(kind).toBe('unset');
      expect(levels.map(({ groupId, ids, unjudged, weights }) => [groupId, ids, unjudged, weights])).toEqual([
        [null, ['a', 'b', 'G'], ['a', 'b', 'G'], null],
        ['G', ['c', 'd'], ['c', 'd'], null],
      ]);
    }
  });
});

describe('judgements', () => {
  const spoilt: Judgement[] = [
    ['a', 'b', 2],
    ['a', 'c', 4],
    ['a', 'd', 8],
    ['b', 'c', 2],
    ['d', 'b', 4],
    ['c', 'd', 2],
  ];

  test('names the one that disagrees most as it was judged, and what the weights imply', () => {
    // Weights 8 4 2 1 but for b against d: 4 has become 1/4.
    const weighed = weigh(itemsOf('a b c d'), said('pairwise', { judgements: spoilt }));
    const { consistency, weights } = weighed.levels[0] ?? {};
    expect(consistency?.worst).toEqual(['d', 'b']);
    expect(consistency?.implied).toBeCloseTo((weights?.[3] ?? NaN) / (weights?.[1] ?? NaN), 12);
    expect(consistency?.implied).toBeLessThan(4);
    expect(consistency?.ratio).toBeGreaterThan(0.1);
  });

  test('lists the pairs that nobody compared', () => {
    expect(missingPairs(['a', 'b', 'c'], [['c', 'a', 3]])).toEqual([
      ['a', 'b'],
      ['b', 'c'],
    ]);
    expect(missingPairs(['a', 'b', 'c', 'd'], spoilt)).toEqual([]);
  });

  test.each<[string, Judgement[]]>([
    [
      'a pair left out',
      [
        ['a', 'b', 2],
        ['b', 'c', 2],
      ],
    ],
    [
      'a pair judged twice',
      [
        ['a', 'b', 2],
        ['b', 'a', 2],
      ],
    ],
    ['a thing against itself', [['a', 'a', 1]]],
    ['a ratio beyond 9', [['a', 'b', 9.1]]],
    ['a ratio of 0', [['a', 'b', 0]]],
    ['a ratio that is no number', [['a', 'b', NaN]]],
  ])('refuses %s', (_, judgements) => {
    expect(() => weigh(itemsOf('a b c'), said('pairwise', { judgements }))).toThrow(RangeError);
  });

  test('compares ten things of a level, not eleven', () => {
    const ids = Array.from('abcdefghijk');
    const all = (some: string[]) => missingPairs(some, []).map(([a, b]): Judgement => [a, b, 1]);
    const ten = said('pairwise', { judgements: all(ids.slice(0, 10)) });
    expectWeights(weightsOf(ids.join(' '), ten), [...Array<number>(10).fill(0.1), 0]);
    expect(() => weigh(itemsOf(ids.join(' ')), said('pairwise', { judgements: all(ids) }))).toThrow(/most/);
  });
});

test.each<[string, WeightStatement]>([
  ['negative points', said('points', { points: { a: -1, b: 1 } })],
  ['points that are no number', said('points', { points: { a: NaN, b: 1 } })],
  ['swings without a 100', said('swing', { points: { a: 90, b: 1 } })],
  ['an order that names one twice', said('centroid', { order: ['a', 'b', 'a'] })],
])('refuses %s', (_, statement) => {
  expect(() => weigh(itemsOf('a b'), statement)).toThrow(RangeError);
});

describe('criteria that come, go and move', () => {
  const judgements: Judgement[] = [
    ['a', 'b', 2],
    ['a', 'c', 4],
    ['b', 'c', 2],
  ];
  const statements: [WeightMethod, WeightStatement, number[]][] = [
    ['points', said('points', { points: { a: 60, b: 30, c: 10 } }), [0.6, 0.3, 0.1]],
    ['swing', said('swing', { points: { a: 100, b: 60, c: 40 } }), [0.5, 0.3, 0.2]],
    ['pairwise', said('pairwise', { judgements }), [4 / 7, 2 / 7, 1 / 7]],
    ['centroid', said('centroid', { order: ['a', 'b', 'c'] }), [11 / 18, 5 / 18, 2 / 18]],
  ];

  test.each(statements)(
    '%s: one added later changes nothing until it is judged',
    (_, statement, expected) => {
      expectWeights(weightsOf('a b c', statement), expected);
      expectWeights(weightsOf('new a b c', statement), [0, ...expected]);
      expect(weigh(itemsOf('new a b c'), statement).levels[0]?.unjudged).toEqual(['new']);
    },
  );

  test.each(statements)('%s: without the first, the others keep their proportions', (method, statement) => {
    const left: Record<WeightMethod, number[]> = {
      points: [0.75, 0.25],
      swing: [0.6, 0.4],
      pairwise: [2 / 3, 1 / 3],
      centroid: [0.75, 0.25],
    };
    const items = itemsOf('b c');
    const weighed = weigh(items, settled(items, statement));
    expectWeights(weighed.kind === 'set' ? [...weighed.weights] : [], left[method]);
  });

  test('one judged against what is gone alone keeps its weight beside a new one', () => {
    const statement = said('pairwise', { judgements: [['a', 'gone', 2]] });
    expectWeights(weightsOf('new a', statement), [0, 1]);
  });

  test('two groups made one keep the larger set of judgements that compares every pair', () => {
    const items = itemsOf('a b d c e');
    const statement = said('pairwise', { judgements: [['d', 'e', 9], ...judgements] });
    expect(() => weigh(items, statement)).toThrow(RangeError);
    const weighed = weigh(items, settled(items, statement));
    expectWeights(weighed.kind === 'set' ? [...weighed.weights] : [], [4 / 7, 2 / 7, 0, 1 / 7, 0]);
    expect(weighed.levels[0]?.unjudged).toEqual(['d', 'e']);
  });

  const ids = ['a', 'b', 'c', 'd', 'e', 'f'];
  const place = fc.constantFrom(null, 'G', 'H', undefined);
  const items = fc.array(place, { minLength: 6, maxLength: 6 }).map((groups) =>
    ids.flatMap((id, k): WeighItem[] => {
      const groupId = groups[k];
      return groupId === undefined ? [] : [{ id, groupId }];
    }),
  );
  /** A whole statement of every level of the items, whichever way. */
  const statementOf = (
    it: readonly WeighItem[],
    method: WeightMethod,
    next: () => number,
  ): WeightStatement => {
    const { levels } = weigh(it, said('points', {}));
    const points = levels.flatMap((level) => level.ids.map((id, k) => [id, k === 0 ? 100 : 1 + next()]));
    return said(method, {
      points: Object.fromEntries(points) as Record<string, number>,
      order: levels.flatMap((level) => level.ids),
      judgements: levels.flatMap((level) =>
        missingPairs(level.ids, []).map(([a, b]): Judgement => [a, b, 1 + (next() % 9)]),
      ),
    });
  };
  const method = fc.constantFrom<WeightMethod>('points', 'swing', 'pairwise', 'centroid');

  test('any whole statement weighs the criteria it was made for: all positive, summing to 1', () => {
    fc.assert(
      fc.property(items, method, fc.infiniteStream(fc.nat({ max: 99 })), (it, how, stream) => {
        const weighed = weigh(
          it,
          statementOf(it, how, () => stream.next().value ?? 0),
        );
        if (weighed.kind === 'unset') {
          expect(it).toEqual([]);
          return;
        }
        expect(weighed.weights.reduce((sum, w) => sum + w, 0)).toBeCloseTo(1, 12);
        expect(weighed.weights.every((w) => w > 0)).toBe(true);
        for (const level of weighed.levels) {
          expect(level.weights?.reduce((sum, w) => sum + w, 0)).toBeCloseTo(1, 12);
        }
      }),
    );
  });

  test('once settled it still weighs whatever the criteria have become, the unjudged at 0', () => {
    fc.assert(
      fc.property(items, items, method, fc.infiniteStream(fc.nat({ max: 99 })), (was, is, how, stream) => {
        const statement = statementOf(was, how, () => stream.next().value ?? 0);
        const weighed = weigh(is, settled(is, statement));
        expect(settled(was, statement)).toEqual(statement);
        if (weighed.kind === 'unset') return;
        expect(weighed.weights.reduce((sum, w) => sum + w, 0)).toBeCloseTo(1, 12);
        const unjudged = weighed.levels.flatMap((level) => level.unjudged);
        is.forEach(({ id, groupId }, j) => {
          if (unjudged.includes(id) || unjudged.includes(groupId ?? '')) expect(weighed.weights[j]).toBe(0);
        });
      }),
    );
  });

  test('scaling the points of a level changes nothing', () => {
    fc.assert(
      fc.property(items, fc.double({ min: 1e-3, max: 1e3, noNaN: true }), (it, factor) => {
        let state = 1;
        const statement = statementOf(it, 'points', () => (state = (state * 7 + 3) % 97));
        const top = weigh(it, statement).levels[0]?.ids ?? [];
        const scaled = Object.entries(statement.points).map(([id, p]) => [
          id,
          top.includes(id) ? p * factor : p,
        ]);
        const again = weigh(it, {
          ...statement,
          points: Object.fromEntries(scaled) as Record<string, number>,
        });
        const once = weigh(it, statement);
        expect(again.kind).toBe(once.kind);
        if (once.kind === 'set' && again.kind === 'set') expectWeights([...again.weights], [...once.weights]);
      }),
    );
  });
});

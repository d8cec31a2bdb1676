import fc from 'fast-check';
import { expect, test } from 'vitest';
import { dominators, firstDominators } from '#core/decision/dominance.ts';
import { completeValues } from '#core/decision/overall.ts';
import { rank } from '#core/decision/rank.ts';
import { weightsFromPoints } from '#core/decision/weights.ts';
import { preparedValues } from './tables.ts';

const value = fc.integer({ min: 0, max: 4 }).map((v) => v / 4);
const rows = (criteria: number) =>
  fc.array(fc.array(value, { minLength: criteria, maxLength: criteria }), { minLength: 1, maxLength: 8 });
const study = (lowest: number) =>
  fc.integer({ min: 1, max: 4 }).chain((n) =>
    fc.record({
      it: rows(n),
      points: fc
        .array(fc.integer({ min: lowest, max: 20 }), { minLength: n, maxLength: n })
        .filter((points) => points.some((p) => p > 0)),
    }),
  );
const leadersOf = (it: number[][], points: number[]): number[] => {
  const result = weightsFromPoints(points);
  if (result.kind !== 'set') throw new Error('no points');
  const { ranked, ranks } = rank(preparedValues(it), result.weights);
  return [...ranked].filter((_, place) => ranks[place] === 1);
};

test('names every site that is at least as good everywhere and better somewhere, and no other', () => {
  expect(
    dominators(
      completeValues(
        preparedValues([
          [1, 0.5],
          [0.5, 0.5],
          [0.5, 0.2],
          [0, 1],
          [1, 0.5],
        ]),
      ),
    ),
  ).toEqual([[], [0, 4], [0, 1, 4], [], []]);
});

test('a dominated site never leads alone, and never at all where all weights are positive', () => {
  fc.assert(
    fc.property(study(0), ({ it, points }) => {
      const above = dominators(completeValues(preparedValues(it)));
      const leaders = leadersOf(it, points);
      const [first = -1] = leaders;
      if (leaders.length === 1) expect(above[first]).toEqual([]);
      if (points.every((p) => p > 0)) for (const site of leaders) expect(above[site]).toEqual([]);
    }),
  );
});

test('a site that nobody dominates can be beaten on no two counts at once', () => {
  fc.assert(
    fc.property(rows(3), (it) => {
      const above = dominators(completeValues(preparedValues(it)));
      it.forEach((row, site) => {
        const better = it.flatMap((other, k) =>
          other.every((v, j) => v >= (row[j] ?? 0)) && other.some((v, j) => v > (row[j] ?? 0)) ? [k] : [],
        );
        expect(above[site]).toEqual(better);
      });
    }),
  );
});

test('one dominator of each site is named: the first along the order that nobody dominates', () => {
  // The third is dominated by the first, the second and the fifth; of these the first and fifth stand alone.
  const table = completeValues(
    preparedValues([
      [1, 0.5],
      [0.5, 0.5],
      [0.5, 0.2],
      [0, 1],
      [1, 0.5],
    ]),
  );
  expect(firstDominators(table, [0, 1, 2, 3, 4])).toEqual([null, 0, 0, null, null]);
  expect(firstDominators(table, [4, 0, 1, 2, 3])).toEqual([null, 4, 4, null, null]);
  // Only what is in the order is compared.
  expect(firstDominators(table, [3, 2, 1])).toEqual([null, null, 1, null, null]);
});

test('a site has a named dominator exactly where it has any, whatever the order', () => {
  fc.assert(
    fc.property(
      fc.integer({ min: 1, max: 4 }).chain((n) => rows(n)),
      fc.infiniteStream(fc.nat()),
      (it, stream) => {
        const table = completeValues(preparedValues(it));
        const above = dominators(table);
        const keys = it.map(() => stream.next().value ?? 0);
        const order = it.map((_, site) => site).sort((a, b) => (keys[a] ?? 0) - (keys[b] ?? 0));
        firstDominators(table, order).forEach((named, site) => {
          const free = order.filter((other) => above[site]?.includes(other) && above[other]?.length === 0);
          expect(named).toBe(free[0] ?? null);
        });
      },
    ),
  );
});

test('a dominator whose sum of values rounds to that of the site is found', () => {
  const tiny = 2 ** -60;
  const table = completeValues(
    preparedValues([
      [1, 0],
      [1, tiny],
    ]),
  );
  expect(firstDominators(table, [0, 1])).toEqual([1, null]);
});

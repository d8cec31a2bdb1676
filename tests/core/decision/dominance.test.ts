import fc from 'fast-check';
import { expect, test } from 'vitest';
import { dominators } from '#core/decision/dominance.ts';
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

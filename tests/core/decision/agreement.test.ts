import fc from 'fast-check';
import { expect, test } from 'vitest';
import { agreement, type Judge } from '#core/decision/agreement.ts';
import { meanRanks } from '#core/decision/concordance.ts';
import { rank } from '#core/decision/rank.ts';
import { reference } from '#tests/support/reference.ts';
import { preparedValues, rowsFrom } from './tables.ts';

/** A judge who ranks things by figures, lowest first, 1, 2, 2, 4; null is not ranked. */
function judgeOf(figures: readonly (number | null)[], weights = [1]): Judge {
  const ranked = figures.flatMap((x, site) => (x === null ? [] : [{ site, x }])).sort((a, b) => a.x - b.x);
  return {
    ranking: {
      ranked: Uint32Array.from(ranked, ({ site }) => site),
      ranks: Uint32Array.from(ranked, ({ x }) => 1 + ranked.filter((other) => other.x < x).length),
    },
    weights: Float64Array.from(weights),
  };
}

test.each(reference('decision-concordance'))('$id', (row) => {
  const answer = agreement(rowsFrom(row.rankings).map((figures) => judgeOf(figures)));
  const w = answer?.concordance;
  expect(w?.kind === 'agreement' ? w.w : NaN).toBeWithin(row.expected, row.tolerance);
});

test('ties take the mean of their ranks', () => {
  expect([...meanRanks([1, 2, 2, 4])]).toEqual([1, 2.5, 2.5, 4]);
  expect([...meanRanks([7, 7, 7])]).toEqual([2, 2, 2]);
  expect([...meanRanks([])]).toEqual([]);
});

test('names the site and the criterion over which judges lie furthest apart', () => {
  // [derived] ranks of the second 3, 1, 1: variance 8/9; of the first 1, 2, 3: 2/3. Weights of the third .1 .5 .3: 8/300.
  const judges = [
    judgeOf([1, 3, 2], [0.5, 0.4, 0.1]),
    judgeOf([2, 1, 3], [0.3, 0.2, 0.5]),
    judgeOf([3, 1, 2], [0.4, 0.3, 0.3]),
  ];
  const { site, criterion, sites, ranks } = agreement(judges) ?? {};
  expect([sites, ranks?.map((row) => [...row])]).toEqual([
    [0, 1, 2],
    [
      [1, 3, 2],
      [2, 1, 3],
      [3, 1, 2],
    ],
  ]);
  expect(site).toMatchObject({ place: 1, said: [3, 1, 1] });
  expect(site?.variance).toBeCloseTo(8 / 9, 12);
  expect(criterion).toMatchObject({ place: 2, said: [0.1, 0.5, 0.3] });
  expect(criterion?.variance).toBeCloseTo(8 / 300, 12);
});

test('only sites that all rank count, by their order among themselves', () => {
  // The second is ranked by one judge alone: the others stand 1, 2, 3 for both.
  const answer = agreement([judgeOf([1, 2, 3, 4]), judgeOf([10, null, 20, 30])]);
  expect(answer?.sites).toEqual([0, 2, 3]);
  expect(answer?.ranks.map((row) => [...row])).toEqual([
    [1, 2, 3],
    [1, 2, 3],
  ]);
  expect(answer?.concordance).toEqual({ kind: 'agreement', w: 1 });
  expect([answer?.site, answer?.criterion]).toEqual([null, null]);
});

test('is undefined where every judge ties everything or no site is ranked by all; none with one judge', () => {
  expect(agreement([judgeOf([1, 1]), judgeOf([1, 1])])?.concordance.kind).toBe('undefined');
  expect(agreement([judgeOf([1, null]), judgeOf([null, 1])])).toMatchObject({
    sites: [],
    concordance: { kind: 'undefined' },
    site: null,
  });
  expect(agreement([judgeOf([1, 2])])).toBeNull();
  expect(agreement([])).toBeNull();
});

test('refuses judges of other criteria', () => {
  expect(() => agreement([judgeOf([1], [1]), judgeOf([1], [0.5, 0.5])])).toThrow(RangeError);
});

test('judges who weigh alike agree on every site and criterion', () => {
  const value = fc.integer({ min: 0, max: 4 }).map((v) => v / 4);
  fc.assert(
    fc.property(fc.array(fc.tuple(value, value), { minLength: 1, maxLength: 8 }), (rows) => {
      const weights = Float64Array.of(0.7, 0.3);
      const judge = { ranking: rank(preparedValues(rows), weights), weights };
      const answer = agreement([judge, judge, judge]);
      expect([answer?.site, answer?.criterion]).toEqual([null, null]);
      expect(answer?.concordance.kind === 'agreement' ? answer.concordance.w : 1).toBeCloseTo(1, 12);
    }),
  );
});

import fc from 'fast-check';
import { expect, test } from 'vitest';
import type { Criterion } from '#core/decision/criterion.ts';
import { figureTable, type Cell } from '#core/decision/figures.ts';
import { failuresOf } from '#core/decision/listing.ts';
import { completeValues } from '#core/decision/overall.ts';
import { prepare } from '#core/decision/prepare.ts';
import { rank } from '#core/decision/rank.ts';
import { subsetOf } from '#core/decision/subset.ts';

const criteria: Criterion[] = [
  { direction: 'more', levels: { kind: 'candidates' }, limit: { kind: 'at-least', figure: -20 } },
  { direction: 'less', levels: { kind: 'candidates' }, limit: null },
  { direction: 'more', levels: { kind: 'candidates' }, limit: { kind: 'at-most', figure: 30 } },
];
const cell: fc.Arbitrary<Cell> = fc.oneof(
  { weight: 8, arbitrary: fc.integer({ min: -50, max: 50 }) },
  { weight: 1, arbitrary: fc.constant(null) },
  { weight: 1, arbitrary: fc.constant('worst' as const) },
);
const rows = fc.array(fc.array(cell, { minLength: 3, maxLength: 3 }), { minLength: 1, maxLength: 10 });
const weights = Float64Array.of(0.5, 0.3, 0.2);

test('in a part each site keeps its value, its gaps and the limits it fails', () => {
  fc.assert(
    fc.property(rows, fc.infiniteStream(fc.nat()), (it, stream) => {
      const whole = prepare(criteria, figureTable(it));
      const sites = it.map((_, site) => site).filter(() => (stream.next().value ?? 0) % 2 === 0);
      sites.reverse();
      const part = subsetOf(whole, sites);
      const [all, some] = [rank(whole, weights), rank(part, weights)];
      expect(part.table.siteCount).toBe(sites.length);
      sites.forEach((site, row) => {
        expect(some.totals[row]).toBe(all.totals[site]);
        expect(some.ceilings[row]).toBe(all.ceilings[site]);
        expect(failuresOf(part, row)).toEqual(failuresOf(whole, site));
      });
      expect(some.setAside.map((row) => sites[row]).sort()).toEqual(
        all.setAside.filter((site) => sites.includes(site)).sort(),
      );
      expect(some.incomplete.map(({ site }) => sites[site]).sort()).toEqual(
        all.incomplete
          .map(({ site }) => site)
          .filter((site) => sites.includes(site))
          .sort(),
      );
    }),
  );
});

test('the ranked sites of any study have no gap that matters, in the order of their ranks', () => {
  const whole = prepare(
    criteria,
    figureTable([
      [0, null, 0],
      [10, 5, 20],
      [20, 5, 40],
      [50, 0, 10],
    ]),
  );
  const { ranked } = rank(whole, weights);
  expect([...ranked]).toEqual([3, 1]);
  const part = subsetOf(whole, ranked);
  // [derived] the lowest 0 and the highest 50 of all four sites stay the levels of the first criterion.
  expect([...completeValues(part).values]).toEqual([1, 1, 0.25, 0.2, 0, 0.5]);
});

test('refuses a place that is none', () => {
  const whole = prepare(criteria, figureTable([[1, 2, 3]]));
  for (const site of [1, -1, 0.5, NaN]) expect(() => subsetOf(whole, [site])).toThrow(RangeError);
});

import fc from 'fast-check';
import { expect, test } from 'vitest';
import { edgeOf } from '#core/decision/edge.ts';
import { completeValues, type ValueTable } from '#core/decision/overall.ts';
import { preparedValues } from './tables.ts';

const tableOf = (rows: number[][]): ValueTable => completeValues(preparedValues(rows));

test('runs from the best on the one criterion to the best on the other', () => {
  // By hand: (.9 .1), (.7 .7), (.2 .8) stand; (.7 .5) and (.1 .8) lose on one count and win on none.
  const rows = [
    [0.7, 0.5],
    [0.2, 0.8],
    [0.9, 0.1],
    [0.1, 0.8],
    [0.7, 0.7],
  ];
  expect(edgeOf(tableOf(rows), 0, 1)).toEqual([2, 4, 1]);
  expect(edgeOf(tableOf(rows), 1, 0)).toEqual([1, 4, 2]);
});

test('sites alike on both stand side by side; one criterion alone leaves the best', () => {
  const rows = [
    [0.5, 0.5],
    [0.4, 0.5],
    [0.5, 0.5],
  ];
  expect(edgeOf(tableOf(rows), 0, 1)).toEqual([0, 2]);
  expect(edgeOf(tableOf(rows), 0, 0)).toEqual([0, 2]);
  expect(edgeOf({ siteCount: 0, criterionCount: 2, values: new Float64Array() }, 0, 1)).toEqual([]);
});

test('is what nobody beats on one criterion without losing on the other, and rises as it falls', () => {
  const value = fc.integer({ min: 0, max: 5 }).map((v) => v / 5);
  fc.assert(
    fc.property(fc.array(fc.tuple(value, value, value), { minLength: 1, maxLength: 12 }), (rows) => {
      const edge = edgeOf(tableOf(rows), 2, 0);
      const pairs = rows.map(([y, , x]) => ({ x, y }));
      const free = pairs.flatMap((site, k) =>
        pairs.some((o) => o.x >= site.x && o.y >= site.y && (o.x > site.x || o.y > site.y)) ? [] : [k],
      );
      expect([...edge].sort((a, b) => a - b)).toEqual(free);
      edge.slice(1).forEach((site, k) => {
        const before = pairs[edge[k] ?? 0];
        expect(pairs[site]?.x).toBeLessThanOrEqual(before?.x ?? NaN);
        expect(pairs[site]?.y).toBeGreaterThanOrEqual(before?.y ?? NaN);
      });
    }),
  );
});

test('refuses a criterion that is none', () => {
  for (const j of [2, -1, 0.5]) expect(() => edgeOf(tableOf([[0, 1]]), 0, j)).toThrow(RangeError);
});

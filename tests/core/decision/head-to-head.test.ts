import fc from 'fast-check';
import { expect, test } from 'vitest';
import { headToHead } from '#core/decision/head-to-head.ts';
import { rank } from '#core/decision/rank.ts';
import { weightsFromPoints } from '#core/decision/weights.ts';
import { preparedValues } from './tables.ts';

test('office location, A against E: size and image cost A most of what closeness and visibility give', () => {
  // [derived] Goodwin & Wright's values and printed weights 32 26 23 10 6 3: 19.2, 0, 2.3, −2.5, −3.6, .6; in all 16.
  const office = preparedValues([
    [1, 0.6, 1, 0.75, 0, 0.9],
    [0.4, 0.6, 0.9, 1, 0.6, 0.7],
  ]);
  const weights = Float64Array.of(0.32, 0.26, 0.23, 0.1, 0.06, 0.03);
  const contrasts = headToHead(office, weights, 0, 1);
  expect(contrasts.map(({ criterion }) => criterion)).toEqual([0, 4, 3, 2, 5, 1]);
  const differences = [0.192, -0.036, -0.025, 0.023, 0.006, 0];
  contrasts.forEach(({ difference }, k) => expect(difference).toBeCloseTo(differences[k] ?? NaN, 12));
  // 80.8 and 64.8 are the book's totals.
  expect(contrasts.reduce((sum, { difference }) => sum + difference, 0)).toBeCloseTo(0.16, 12);
  expect(contrasts[0]?.first).toBeCloseTo(0.32, 12);
  expect(contrasts[0]?.second).toBeCloseTo(0.128, 12);
});

test('for any two sites the differences add up to that of their values, the largest first', () => {
  const value = fc.integer({ min: 0, max: 100 }).map((v) => v / 100);
  const study = fc.integer({ min: 1, max: 6 }).chain((n) =>
    fc.record({
      rows: fc.array(fc.array(value, { minLength: n, maxLength: n }), { minLength: 2, maxLength: 4 }),
      points: fc.array(fc.integer({ min: 1, max: 50 }), { minLength: n, maxLength: n }),
    }),
  );
  fc.assert(
    fc.property(study, ({ rows, points }) => {
      const given = weightsFromPoints(points);
      if (given.kind === 'unset') throw new Error('no points');
      const prepared = preparedValues(rows);
      const { totals } = rank(prepared, given.weights);
      const [there, back] = [
        headToHead(prepared, given.weights, 0, 1),
        headToHead(prepared, given.weights, 1, 0),
      ];
      const sizes = there.map(({ difference }) => Math.abs(difference));
      expect(sizes).toEqual([...sizes].sort((a, b) => b - a));
      expect(there.reduce((sum, { difference }) => sum + difference, 0)).toBeCloseTo(
        (totals[0] ?? NaN) - (totals[1] ?? NaN),
        12,
      );
      expect(back.map(({ criterion }) => criterion)).toEqual(there.map(({ criterion }) => criterion));
    }),
  );
});

test('refuses a site that is none', () => {
  const prepared = preparedValues([[1], [0]]);
  for (const site of [2, -1, NaN])
    expect(() => headToHead(prepared, Float64Array.of(1), 0, site)).toThrow(RangeError);
});

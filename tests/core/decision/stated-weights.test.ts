import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { rankOrderCentroid, weightsFromOrder } from '#core/decision/centroid.ts';
import { weightsFromSwing } from '#core/decision/swing.ts';
import { reference } from '#tests/support/reference.ts';

describe('swing weights', () => {
  test.each(reference('decision-swing'))('$id', (row) => {
    const weights = weightsFromSwing(row.points.split(';').map(Number));
    expect((weights[Number(row.place)] ?? NaN) * 100).toBeWithin(row.expected, row.tolerance);
  });

  test('sum to 1 and keep the proportions of the swings', () => {
    const swings = fc.array(fc.integer({ min: 0, max: 100 }), { maxLength: 11 });
    fc.assert(
      fc.property(swings, fc.nat(), (others, at) => {
        const points = others.toSpliced(at % (others.length + 1), 0, 100);
        const weights = weightsFromSwing(points);
        const full = weights[points.indexOf(100)] ?? NaN;
        expect(weights.reduce((sum, w) => sum + w, 0)).toBeCloseTo(1, 12);
        points.forEach((p, j) => expect(weights[j]).toBeCloseTo((p / 100) * full, 12));
      }),
    );
  });

  test.each<[string, number[]]>([
    ['no swing of 100', [50, 20]],
    ['a swing above 100', [100, 101]],
    ['a negative swing', [100, -1]],
    ['a swing that is no number', [100, NaN]],
    ['nothing', []],
  ])('refuses %s', (_, points) => {
    expect(() => weightsFromSwing(points)).toThrow(RangeError);
  });
});

describe('rank-order centroid', () => {
  test.each(reference('decision-centroid'))('$id', (row) => {
    const weights = rankOrderCentroid(Number(row.count));
    expect(weights).toHaveLength(Number(row.count));
    expect(weights[Number(row.place)]).toBeWithin(row.expected, row.tolerance);
  });

  test('is the mean of the corners of the ordered part: (1, 0, …), (1/2, 1/2, 0, …), …', () => {
    // [derived] the centroid of a simplex is the mean of its corners.
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 60 }), (n) => {
        rankOrderCentroid(n).forEach((w, k) => {
          const corners = Array.from({ length: n }, (_, c) => (k <= c ? 1 / (c + 1) : 0));
          expect(w).toBeCloseTo(corners.reduce((sum, x) => sum + x, 0) / n, 12);
        });
      }),
    );
  });

  test('gives each criterion the weight of its place in the order', () => {
    const weights = weightsFromOrder([2, 0, 1]);
    expect(weights[2]).toBeWithin(0.6111, 5e-5);
    expect(weights[0]).toBeWithin(0.2778, 5e-5);
    expect(weights[1]).toBeWithin(0.1111, 5e-5);
  });

  test.each<[string, number[]]>([
    ['nothing', []],
    ['a criterion twice', [0, 0]],
    ['a criterion that is none', [1, 2]],
  ])('refuses an order of %s', (_, order) => {
    expect(() => weightsFromOrder(order)).toThrow(RangeError);
  });

  test.each([0, -1, 1.5, NaN])('refuses %s things', (count) => {
    expect(() => rankOrderCentroid(count)).toThrow(RangeError);
  });
});

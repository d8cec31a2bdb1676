import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { criterionOf } from '#contract/value-function.ts';
import { assertCriterion } from '#core/decision/criterion.ts';
import { shareOfExponential } from '#core/decision/exponential.ts';
import { figureTable } from '#core/decision/figures.ts';
import { prepare } from '#core/decision/prepare.ts';
import { shapedValue, type Knot, type Shape } from '#core/decision/shape.ts';
import { reference } from '#tests/support/reference.ts';

describe('value functions', () => {
  test.each(reference('decision-shapes'))('$id', (row) => {
    const [kind, curvature] = row.function.split(':');
    const points = row.function.split(';').map((pair) => pair.split(',').map(Number) as [number, number]);
    const criterion =
      kind === 'exp'
        ? criterionOf({ worst: 0, best: 1, curvature: Number(curvature) })
        : criterionOf({ points });
    const { values } = prepare([criterion], figureTable([[Number(row.figure)]]));
    expect(values[0]).toBeWithin(row.expected, row.tolerance);
  });

  test('the exponential agrees with the built-in expm1', () => {
    const position = fc.double({ min: 0, max: 1, noNaN: true });
    const curvature = fc.double({ min: -700, max: 700, noNaN: true });
    fc.assert(
      fc.property(position, curvature, (s, c) => {
        fc.pre(Math.abs(c) > 1e-300);
        const built =
          c > 0 ? Math.expm1(-c * s) / Math.expm1(-c) : 1 - Math.expm1(c * (1 - s)) / Math.expm1(c);
        expect(Math.abs(shareOfExponential(s, c) - built)).toBeLessThan(4e-15);
      }),
    );
  });

  test('never falls from worst to best, and meets both ends', () => {
    const step = fc.double({ min: 0, max: 1, noNaN: true });
    const knots = fc.uniqueArray(fc.tuple(fc.integer({ min: 1, max: 99 }), step), {
      maxLength: 3,
      selector: ([s]) => s,
    });
    const shape: fc.Arbitrary<Shape> = fc.oneof(
      fc
        .double({ min: -50, max: 50, noNaN: true })
        .map((curvature) => ({ kind: 'exponential' as const, curvature })),
      knots.map((inner) => {
        const positions = inner.map(([s]) => s / 100).sort((a, b) => a - b);
        const values = inner.map(([, v]) => v).sort((a, b) => a - b);
        const middle = positions.map((s, k): Knot => [s, values[k] ?? 0]);
        return { kind: 'piecewise' as const, knots: [[0, 0], ...middle, [1, 1]] as Knot[] };
      }),
    );
    fc.assert(
      fc.property(shape, step, step, (it, a, b) => {
        const [low, high] = [shapedValue(Math.min(a, b), it), shapedValue(Math.max(a, b), it)];
        expect(low).toBeLessThanOrEqual(high + 1e-15);
        expect([shapedValue(0, it), shapedValue(1, it)]).toEqual([0, 1]);
      }),
    );
  });

  test.each<[string, Shape]>([
    ['a curvature that is none', { kind: 'exponential', curvature: NaN }],
    ['one knot', { kind: 'piecewise', knots: [[0, 0]] }],
    ['six knots', { kind: 'piecewise', knots: [0, 0.2, 0.4, 0.6, 0.8, 1].map((s): Knot => [s, s]) }],
    [
      'knots that do not reach 1',
      {
        kind: 'piecewise',
        knots: [
          [0, 0],
          [1, 0.9],
        ],
      },
    ],
    [
      'knots that stand still',
      {
        kind: 'piecewise',
        knots: [
          [0, 0],
          [0.5, 0.2],
          [0.5, 0.4],
          [1, 1],
        ],
      },
    ],
    [
      'knots that fall',
      {
        kind: 'piecewise',
        knots: [
          [0, 0],
          [0.3, 0.6],
          [0.6, 0.5],
          [1, 1],
        ],
      },
    ],
  ])('refuses %s', (_, shape) => {
    const levels = { kind: 'fixed', worst: 0, best: 1 } as const;
    expect(() => assertCriterion({ direction: 'more', levels, limit: null, shape })).toThrow(RangeError);
  });
});

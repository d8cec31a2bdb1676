import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Criterion } from '#core/decision/criterion.ts';
import { figureTable } from '#core/decision/figures.ts';
import { prepare } from '#core/decision/prepare.ts';
import { rank } from '#core/decision/rank.ts';
import { tornado } from '#core/decision/tornado.ts';
import type { UncertainFigure } from '#core/decision/uncertain.ts';
import { weightsFromPoints } from '#core/decision/weights.ts';

const percent = (direction: 'more' | 'less', shape?: Criterion['shape']): Criterion => ({
  direction,
  levels: { kind: 'fixed', worst: direction === 'more' ? 0 : 100, best: direction === 'more' ? 100 : 0 },
  limit: null,
  ...(shape ? { shape } : {}),
});
const criteria = [percent('more'), percent('less'), percent('more', { kind: 'exponential', curvature: 2 })];
const weightsOf = (points: readonly number[]): Float64Array => {
  const given = weightsFromPoints(points);
  if (given.kind === 'unset') throw new Error('no points');
  return given.weights;
};

describe('one input at a time', () => {
  // Values .8 .5, .6 .6, .2 .9; weights .6 .4: totals .68, .60, .48, so the margin is .08.
  const two = [percent('more'), percent('less')];
  const prepared = prepare(
    two,
    figureTable([
      [80, 50],
      [60, 40],
      [20, 10],
    ]),
  );
  const weights = Float64Array.of(0.6, 0.4);
  const figures: UncertainFigure[] = [
    { site: 2, criterion: 0, low: 10, likely: 20, high: 30 },
    { site: 1, criterion: 1, low: 10, likely: 40, high: 90 },
    { site: 0, criterion: 0, low: 60, likely: 80, high: 90 },
    { site: 0, criterion: 1, low: 50, likely: 50, high: 50 },
    { site: 2, criterion: 1, low: 0, likely: 10, high: 20 },
  ];

  test('by hand: widest first, with the margin at either end', () => {
    // [derived] B's second: at 10 its total is .36 + .36 = .72, margin −.04; at 90 it is .40, then C's .48 is the best
    // other and the margin .20. A's first: .56 − .60 and .74 − .60. C never reaches B.
    const answer = tornado({ prepared, weights, leader: 0, uncertain: figures });
    expect(answer?.margin).toBeCloseTo(0.08, 12);
    expect(
      answer?.bars.map(({ site, criterion, low, high, atLow, atHigh }) => [
        [site, criterion, low, high],
        [atLow, atHigh].map((margin) => Number(margin.toFixed(12))),
      ]),
    ).toEqual([
      [
        [1, 1, 10, 90],
        [-0.04, 0.2],
      ],
      [
        [0, 0, 60, 90],
        [-0.04, 0.14],
      ],
      [
        [2, 0, 10, 30],
        [0.08, 0.08],
      ],
      [
        [2, 1, 0, 20],
        [0.08, 0.08],
      ],
    ]);
  });

  test('two that tie have a margin of 0', () => {
    const tied = prepare(
      two,
      figureTable([
        [30, 40],
        [30, 40],
      ]),
    );
    expect(tornado({ prepared: tied, weights, leader: 1, uncertain: [] })).toEqual({ margin: 0, bars: [] });
  });

  test('is none where the leader stands alone or is not ranked', () => {
    const limited = prepare(
      [{ ...percent('more'), limit: { kind: 'at-least', figure: 50 } }],
      figureTable([[80], [20]]),
    );
    const question = { prepared: limited, weights: Float64Array.of(1), uncertain: [] };
    expect(tornado({ ...question, leader: 0 })).toBeNull();
    expect(tornado({ ...question, leader: 1 })).toBeNull();
  });

  test('sites that are set aside or miss a figure are no rivals, and their figures move nothing', () => {
    const some = prepare(
      [{ ...percent('more'), limit: { kind: 'at-least', figure: 20 } }, percent('less')],
      figureTable([
        [80, 50],
        [10, 0],
        [90, null],
        [60, 40],
      ]),
    );
    const uncertain = [1, 2, 3].map((site) => ({ site, criterion: 0, low: 0, likely: 50, high: 100 }));
    const answer = tornado({ prepared: some, weights, leader: 0, uncertain });
    expect(answer?.margin).toBeCloseTo(0.08, 12);
    expect(answer?.bars.map(({ site }) => site)).toEqual([3]);
  });

  test('refuses a likely figure outside low and high, and weights of another number', () => {
    const wrong = [{ site: 0, criterion: 0, low: 90, likely: 80, high: 100 }];
    expect(() => tornado({ prepared, weights, leader: 0, uncertain: wrong })).toThrow(RangeError);
    expect(() => tornado({ prepared, weights: Float64Array.of(1), leader: 0, uncertain: [] })).toThrow(
      RangeError,
    );
  });

  const figure = fc.integer({ min: 0, max: 100 });
  test('for any study: ranking again with the one figure changed gives the same margin', () => {
    fc.assert(
      fc.property(
        fc.array(fc.tuple(figure, figure, figure), { minLength: 2, maxLength: 7 }),
        fc
          .array(fc.integer({ min: 0, max: 9 }), { minLength: 3, maxLength: 3 })
          .filter((p) => Math.max(...p) > 0),
        fc.tuple(figure, figure),
        (rows, points, [down, up]) => {
          const whole = prepare(criteria, figureTable(rows));
          const given = weightsOf(points);
          const leader = rank(whole, given).ranked[0] ?? 0;
          const uncertain = rows.flatMap((row, site) =>
            row.map((likely, criterion) => ({
              site,
              criterion,
              low: likely - down,
              likely,
              high: likely + up,
            })),
          );
          const marginOf = (site: number, criterion: number, changed: number): number => {
            const again = rows.map((row, s) =>
              row.map((x, j) => (s === site && j === criterion ? changed : x)),
            );
            const { totals } = rank(prepare(criteria, figureTable(again)), given);
            return (totals[leader] ?? NaN) - Math.max(...totals.filter((_, s) => s !== leader));
          };
          const bars = tornado({ prepared: whole, weights: given, leader, uncertain })?.bars ?? [];
          expect(bars).toHaveLength(down + up > 0 ? uncertain.length : 0);
          bars.forEach(({ site, criterion, low, high, atLow, atHigh }, k) => {
            expect(atLow).toBeCloseTo(marginOf(site, criterion, low), 10);
            expect(atHigh).toBeCloseTo(marginOf(site, criterion, high), 10);
            const before = bars[k - 1];
            if (before) {
              const width = Math.abs(before.atHigh - before.atLow);
              expect(width).toBeGreaterThanOrEqual(Math.abs(atHigh - atLow));
            }
          });
        },
      ),
      { numRuns: 60 },
    );
  });
});

import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { leaderChanges } from '#core/decision/leader-change.ts';
import { completeValues } from '#core/decision/overall.ts';
import { rank } from '#core/decision/rank.ts';
import { weightsFromPoints } from '#core/decision/weights.ts';
import { preparedValues } from './tables.ts';

/** The weights after criterion k has been moved to w, the others keeping their proportions, or equal where all are 0. */
function moved(weights: Float64Array, k: number, w: number): Float64Array {
  const rest = weights.reduce((sum, x, j) => (j === k ? sum : sum + x), 0);
  return weights.map((x, j) =>
    j === k ? w : rest > 0 ? (x / rest) * (1 - w) : (1 - w) / (weights.length - 1),
  );
}

const order = (rows: number[][], weights: Float64Array) => rank(preparedValues(rows), weights);
const leadersOf = (rows: number[][], weights: Float64Array): number[] => {
  const { ranked, ranks } = order(rows, weights);
  return [...ranked].filter((_, place) => ranks[place] === 1);
};
const changesOf = (rows: number[][], weights: Float64Array) =>
  leaderChanges(completeValues(preparedValues(rows)), weights, order(rows, weights).ranked[0] ?? 0);

describe('the weight at which the leader changes', () => {
  test('two criteria, by hand: C leads for w1 in (.4, .6)', () => {
    // [derived] A (1, 0), B (0, 1), C (.6, .6): A passes C at w1 = .6, B at w1 = .4.
    const rows = [
      [1, 0],
      [0, 1],
      [0.6, 0.6],
    ];
    const [first, second] = changesOf(rows, Float64Array.of(0.5, 0.5));
    expect(first?.above?.weight).toBeCloseTo(0.6, 12);
    expect(first?.above?.leader).toBe(0);
    expect(first?.below?.weight).toBeCloseTo(0.4, 12);
    expect(first?.below?.leader).toBe(1);
    expect([second?.above?.leader, second?.below?.leader]).toEqual([1, 0]);
  });

  test('a tie now is a change at distance 0, on the side where the rival pulls ahead', () => {
    const [first, second] = changesOf(
      [
        [0, 1],
        [1, 0],
      ],
      Float64Array.of(0.5, 0.5),
    );
    expect(first).toEqual({ below: null, above: { weight: 0.5, leader: 1 } });
    expect(second).toEqual({ below: { weight: 0.5, leader: 1 }, above: null });
  });

  test('sites alike tie whatever the weight: distance 0 on both sides', () => {
    const change = { weight: 0.5, leader: 1 };
    expect(
      changesOf(
        [
          [0.5, 1],
          [0.5, 1],
        ],
        Float64Array.of(0.5, 0.5),
      )[0],
    ).toEqual({ below: change, above: change });
  });

  test('with a weight of 1 the others share equally', () => {
    // [derived] at w: 1·w + 0·(1 − w) against .4 w + (1 + .8)/2 (1 − w): equal at w = .9/1.5.
    const [first, second] = changesOf(
      [
        [1, 0, 0],
        [0.4, 1, 0.8],
      ],
      Float64Array.of(1, 0, 0),
    );
    expect(first?.below?.weight).toBeCloseTo(0.6, 12);
    expect(first?.above).toBeNull();
    // Moving the second up takes from the first: 1 − w against .4 (1 − w) + w, equal at w = .6/1.6.
    expect(second?.above?.weight).toBeCloseTo(0.375, 12);
    expect(second?.below).toBeNull();
  });

  test('one criterion alone has nothing to trade with; a tie at the very end is no change', () => {
    expect(changesOf([[1], [0]], Float64Array.of(1))).toEqual([{ below: null, above: null }]);
    expect(
      changesOf(
        [
          [1, 1],
          [1, 0],
        ],
        Float64Array.of(0.5, 0.5),
      )[0]?.above,
    ).toBeNull();
  });

  const value = fc.integer({ min: 0, max: 100 }).map((v) => v / 100);
  const study = fc.integer({ min: 2, max: 5 }).chain((n) =>
    fc.record({
      rows: fc.array(fc.array(value, { minLength: n, maxLength: n }), { minLength: 2, maxLength: 8 }),
      points: fc
        .array(fc.integer({ min: 0, max: 20 }), { minLength: n, maxLength: n })
        .filter((points) => points.some((p) => p > 0)),
    }),
  );

  test('for any study: before it the leader leads, at it both do, beyond it the other', () => {
    fc.assert(
      fc.property(study, ({ rows, points }) => {
        const result = weightsFromPoints(points);
        if (result.kind !== 'set') throw new Error('no points');
        const { weights } = result;
        const leader = order(rows, weights).ranked[0] ?? 0;
        changesOf(rows, weights).forEach(({ below, above }, k) => {
          const now = weights[k] ?? 0;
          for (const [change, side, end] of [
            [below, -1, 0],
            [above, 1, 1],
          ] as const) {
            const until = change?.weight ?? end;
            const before = leadersOf(rows, moved(weights, k, now + (until - now) * 0.999));
            expect(before).toContain(leader);
            if (!change) continue;
            const at = order(rows, moved(weights, k, change.weight)).totals;
            expect(Math.abs((at[leader] ?? 0) - (at[change.leader] ?? 0))).toBeLessThan(1e-9);
            expect(Math.max(...at) - (at[leader] ?? 0)).toBeLessThan(1e-9);
            const beyond = Math.min(1, Math.max(0, change.weight + side * 1e-7));
            expect(leadersOf(rows, moved(weights, k, beyond))).toContain(change.leader);
          }
        });
      }),
      { numRuns: 300 },
    );
  });
});

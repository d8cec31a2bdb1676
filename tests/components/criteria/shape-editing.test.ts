import { scaleLinear } from 'd3-scale';
import { describe, expect, test } from 'vitest';
import {
  addKnot,
  arrowMove,
  bend,
  canAddKnot,
  dragKnot,
  figureAt,
  middleOf,
  moveKnot,
  nudgeCurve,
  nudgeKnot,
  positionOf,
  removeKnot,
  shapeAs,
} from '#components/criteria/shape-editing.ts';
import { CriterionShape } from '#contract/criterion.ts';
import { areKnots, shapedValue } from '#core/decision/shape.ts';

type Knots = [number, number][];
const cost = { worst: 400, best: 200 };
const days = { worst: 100, best: 300 };
const one: Knots = [
  [0, 0],
  [0.4, 0.7],
  [1, 1],
];
const three: Knots = [[0, 0], [0.2, 0.3], [0.5, 0.6], [0.8, 0.6], [1, 1]]; // prettier-ignore

test('figures and positions are each other’s inverse, whichever level is greater', () => {
  for (const levels of [cost, days]) {
    const scale = scaleLinear([levels.worst, levels.best], [0, 1]);
    for (const figure of [100, 210.5, 333, 400]) {
      expect(positionOf(levels, figure)).toBeCloseTo(scale(figure), 12);
      expect(figureAt(levels, positionOf(levels, figure))).toBeCloseTo(figure, 9);
    }
  }
});

describe('a point', () => {
  test('goes where it is put, to whole per cents when dragged and tenths with Shift', () => {
    expect(moveKnot(one, 1, [0.61234, 0.51234])[1]).toEqual([0.61234, 0.51234]);
    expect(dragKnot(one, 1, [0.61234, 0.51234], false)[1]).toEqual([0.61, 0.51]);
    expect(dragKnot(one, 1, [0.61234, 0.51234], true)[1]).toEqual([0.612, 0.512]);
  });

  test('stops at its neighbours: never past one, never falling', () => {
    expect(moveKnot(three, 2, [0.1, 0.1])[2]).toEqual([0.201, 0.3]);
    expect(moveKnot(three, 2, [0.95, 0.95])[2]).toEqual([0.799, 0.6]);
    expect(moveKnot(one, 1, [-3, -3])[1]).toEqual([0.001, 0]);
    expect(moveKnot(one, 1, [3, 3])[1]).toEqual([0.999, 1]);
  });

  test('the ends are the levels and stay; so does one without room', () => {
    expect(moveKnot(one, 0, [0.3, 0.3])).toEqual(one);
    expect(moveKnot(one, 2, [0.3, 0.3])).toEqual(one);
    const tight: Knots = [[0, 0], [0.5, 0.5], [0.5004, 0.6], [0.5008, 0.7], [1, 1]]; // prettier-ignore
    expect(moveKnot(tight, 2, [0.6, 0.6])).toEqual(tight);
  });

  test('the arrows move it by 1 %, with Shift 0.1 %; right is towards greater figures', () => {
    expect(arrowMove('ArrowRight', false, days)).toEqual([0.01, 0]);
    expect(arrowMove('ArrowRight', false, cost)).toEqual([-0.01, 0]);
    expect(arrowMove('ArrowUp', true, cost)).toEqual([0, 0.001]);
    expect(arrowMove('a', false, cost)).toBeUndefined();
    expect(nudgeKnot(one, 1, [-0.01, 0.001])[1]).toEqual([0.39, 0.701]);
    let walked = one;
    for (let press = 0; press < 30; press++) walked = nudgeKnot(walked, 1, [0.01, 0.01]);
    expect(walked[1]).toEqual([0.7, 1]);
  });

  test('is added on the line in its longest piece, where it changes no value', () => {
    const more = addKnot(one);
    expect(more).toEqual([[0, 0], [0.4, 0.7], [0.7, 0.85], [1, 1]]); // prettier-ignore
    for (let s = 0; s <= 1; s += 0.05)
      expect(shapedValue(s, { kind: 'piecewise', knots: more })).toBeCloseTo(
        shapedValue(s, { kind: 'piecewise', knots: one }),
        12,
      );
    expect(canAddKnot(three)).toBe(false);
    expect(addKnot(three)).toEqual(three);
  });

  test('is taken away, and the ends are not', () => {
    expect(removeKnot(three, 2)).toEqual([[0, 0], [0.2, 0.3], [0.8, 0.6], [1, 1]]); // prettier-ignore
    expect(removeKnot(three, 0)).toEqual(three);
    expect(removeKnot(three, 4)).toEqual(three);
  });

  test('whatever is done to it, a value function is left', () => {
    let knots = three;
    // A fixed walk over all moves.
    for (let turn = 0; turn < 500; turn++) {
      const index = turn % 7;
      const place: [number, number] = [((turn * 37) % 101) / 90 - 0.05, ((turn * 53) % 97) / 85 - 0.05];
      knots =
        turn % 11 === 0 ? addKnot(removeKnot(knots, index)) : dragKnot(knots, index, place, turn % 2 > 0);
      expect(areKnots(knots)).toBe(true);
    }
  });
});

describe('a curve', () => {
  test('goes through the place its middle is dragged to, to a hundredth of its curvature', () => {
    for (const middle of [0.2, 0.5, 0.55, 0.9])
      expect(Math.abs(middleOf({ kind: 'exponential', curvature: bend(middle) }) - middle)).toBeLessThan(
        0.001,
      );
    expect(bend(0.5)).toBe(0);
  });

  test('stays within what a curvature may be, however far it is dragged', () => {
    expect([bend(-4), bend(0), bend(1), bend(7)]).toEqual([-20, -20, 20, 20]);
  });

  test('an arrow moves its middle', () => {
    const up = nudgeCurve(2, 0.01);
    expect(middleOf({ kind: 'exponential', curvature: up })).toBeCloseTo(
      middleOf({ kind: 'exponential', curvature: 2 }) + 0.01,
      2,
    );
    expect(up).toBeGreaterThan(2);
    expect(nudgeCurve(20, 0.01)).toBe(20);
  });
});

describe('choosing another kind moves values as little as may be', () => {
  const curve: CriterionShape = { kind: 'exponential', curvature: 3 };

  test('points of a curve lie on it, and a curve through points keeps their middle', () => {
    const points = shapeAs('piecewise', curve);
    if (points.kind !== 'piecewise') throw new Error('no points');
    expect(points.knots).toHaveLength(5);
    for (const [s, v] of points.knots)
      expect(Math.abs(shapedValue(s, curve) - v)).toBeLessThanOrEqual(0.0005);
    expect(middleOf(shapeAs('exponential', points))).toBeCloseTo(middleOf(curve), 2);
  });

  test('straight becomes one point on the line, or a curve that does not bend', () => {
    expect(shapeAs('piecewise', { kind: 'straight' })).toEqual({
      kind: 'piecewise',
      knots: [[0, 0], [0.5, 0.5], [1, 1]], // prettier-ignore
    });
    expect(shapeAs('exponential', { kind: 'straight' })).toEqual({ kind: 'exponential', curvature: 0 });
    expect(shapeAs('straight', curve)).toEqual({ kind: 'straight' });
    expect(shapeAs('exponential', curve)).toBe(curve);
  });

  test('all of them are shapes the interface takes', () => {
    for (const kind of ['straight', 'piecewise', 'exponential'] as const)
      expect(CriterionShape.safeParse(shapeAs(kind, curve)).success).toBe(true);
  });
});

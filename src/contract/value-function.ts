import type { Criterion } from '#core/decision/criterion.ts';
import { STRAIGHT, type Knot, type Shape } from '#core/decision/shape.ts';
import { straightValue } from '#core/decision/value.ts';

/** A value function as it crosses the wire: two levels, bent or not, or points. */
export interface ValueFunctionFields {
  worst?: number | undefined;
  best?: number | undefined;
  curvature?: number | undefined;
  points?: readonly (readonly [figure: number, value: number])[] | undefined;
}

interface Levelled {
  worst: number;
  best: number;
  shape: Shape;
}

/** The levels of points are their ends; each point becomes a knot at its place between them. */
function levelledPoints(points: NonNullable<ValueFunctionFields['points']>): Levelled {
  const [first = [NaN, NaN], last = first] = [points[0], points.at(-1)];
  const rising = first[1] <= last[1] ? points : [...points].reverse();
  const [worst, best] = first[1] <= last[1] ? [first[0], last[0]] : [last[0], first[0]];
  const span = { kind: 'span', worst, best } as const;
  return {
    worst,
    best,
    shape: { kind: 'piecewise', knots: rising.map(([x, v]): Knot => [straightValue(x, span), v]) },
  };
}

/** Levels and shape; levels that were left out are NaN, which core refuses. */
export function levelledOf({ worst = NaN, best = NaN, curvature, points }: ValueFunctionFields): Levelled {
  if (points) return levelledPoints(points);
  return { worst, best, shape: curvature === undefined ? STRAIGHT : { kind: 'exponential', curvature } };
}

/** The criterion that core weighs by. */
export function criterionOf(fields: ValueFunctionFields): Criterion {
  const { worst, best, shape } = levelledOf(fields);
  return {
    direction: best > worst ? 'more' : 'less',
    levels: { kind: 'fixed', worst, best },
    limit: null,
    shape,
  };
}

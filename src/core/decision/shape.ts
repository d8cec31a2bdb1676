import { shareOfExponential } from './exponential.ts';

/** Most points of a piecewise-linear value function. */
export const MOST_KNOTS = 5;

/** A point of a piecewise-linear value function: how far from the worst level to the best one (0…1), and the value there. */
export type Knot = readonly [position: number, value: number];

/**
 * How value grows from the worst level to the best.
 * `straight`: in proportion. `exponential`: (1 − e^(−c s))/(1 − e^(−c)) with curvature c; a positive c gains most near
 * the worst level, a negative one near the best, 0 is straight. `piecewise`: straight between two to five knots, from
 * (0, 0) to (1, 1).
 */
export type Shape =
  | { kind: 'straight' }
  | { kind: 'exponential'; curvature: number }
  | { kind: 'piecewise'; knots: readonly Knot[] };

export const STRAIGHT: Shape = { kind: 'straight' };

/**
 * Refuses a shape that is no value function.
 * @throws RangeError when the curvature is not finite, or the knots are too few or many, do not run from (0, 0) to
 * (1, 1), do not advance, or fall.
 */
export function assertShape(shape: Shape): void {
  if (shape.kind === 'exponential' && !Number.isFinite(shape.curvature))
    throw new RangeError(`shape: curvature ${shape.curvature} is not finite`);
  if (shape.kind === 'piecewise' && !areKnots(shape.knots))
    throw new RangeError(`shape: ${JSON.stringify(shape.knots)} are no knots of a value function`);
}

/** Whether knots run from (0, 0) to (1, 1), advance and never fall. */
export function areKnots(knots: readonly Knot[]): boolean {
  const [first, last] = [knots[0], knots[knots.length - 1]];
  if (!first || !last || knots.length < 2 || knots.length > MOST_KNOTS) return false;
  if (first[0] !== 0 || first[1] !== 0 || last[0] !== 1 || last[1] !== 1) return false;
  return knots.slice(1).every(([s, v], k) => {
    const [before, lower] = knots[k] ?? [NaN, NaN];
    return s > before && v >= lower;
  });
}

/**
 * The value at a position between the levels.
 * @param s 0 at the worst level, 1 at the best.
 * @returns 0…1.
 * @see references.ts `keeneyRaiffa`; checked by tests/reference/decision-shapes.csv
 */
export function shapedValue(s: number, shape: Shape): number {
  if (shape.kind === 'straight') return s;
  if (shape.kind === 'exponential') return shareOfExponential(s, shape.curvature);
  return betweenKnots(s, shape.knots);
}

function betweenKnots(s: number, knots: readonly Knot[]): number {
  let [before, lower]: Knot = [0, 0];
  for (const [at, value] of knots) {
    if (s === at) return value;
    if (s < at) return lower + ((s - before) / (at - before)) * (value - lower);
    [before, lower] = [at, value];
  }
  return lower;
}

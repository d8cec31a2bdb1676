import { assertShape, type Shape } from './shape.ts';

/** Which way a criterion pulls: more of it is better, or less of it is. */
export type Direction = 'more' | 'less';

/**
 * The two figures between which a criterion's value runs from 0 to 1, in the criterion's own unit.
 * `candidates`: the lowest and highest figure over all sites that have one, set-aside sites too, so a score moves
 * when a site is added. `fixed`: entered once, so that scores stay comparable whatever sites join.
 */
export type Levels = { kind: 'candidates' } | { kind: 'fixed'; worst: number; best: number };

/** A must-meet limit in the criterion's own unit; meeting it exactly is meeting it. */
export interface Limit {
  kind: 'at-least' | 'at-most';
  figure: number;
}

/** What weighing needs to know of a criterion; its name, unit and source are the caller's. */
export interface Criterion {
  direction: Direction;
  levels: Levels;
  limit: Limit | null;
  /** How value grows between the levels; straight where none is said. */
  shape?: Shape;
}

/**
 * Refuses a criterion that cannot be weighed.
 * @throws RangeError when fixed levels are equal, run against the direction or are not finite, a limit is not finite, or
 * the shape is no value function.
 */
export function assertCriterion(criterion: Criterion): void {
  const { direction, levels, limit, shape } = criterion;
  if (shape) assertShape(shape);
  if (limit !== null && !Number.isFinite(limit.figure)) {
    throw new RangeError(`limit: ${limit.figure} is not a finite figure`);
  }
  if (levels.kind === 'candidates') return;
  const step = levels.best - levels.worst;
  if (!Number.isFinite(step))
    throw new RangeError(`levels: ${levels.worst} to ${levels.best} are not finite`);
  if (direction === 'more' ? step <= 0 : step >= 0) {
    throw new RangeError(
      `levels: worst ${levels.worst} to best ${levels.best} runs against "${direction} is better"`,
    );
  }
}

/** Whether a figure meets a must-meet limit. */
export function meetsLimit(figure: number, limit: Limit): boolean {
  return limit.kind === 'at-least' ? figure >= limit.figure : figure <= limit.figure;
}

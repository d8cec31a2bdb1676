import { assertCriterion, type Criterion } from './criterion.ts';
import { CELL, type FigureTable } from './figures.ts';
import { shapedValue, STRAIGHT, type Shape } from './shape.ts';

/**
 * The span a criterion's value runs over, in its own unit.
 * `span`: worst ≠ best. `flat`: every site that has a figure has this same one, so the criterion tells none apart and
 * its value is 0 for all. `empty`: no site has a figure.
 */
export type Span =
  { kind: 'span'; worst: number; best: number } | { kind: 'flat'; figure: number } | { kind: 'empty' };

/**
 * The levels a criterion uses: its fixed ones, or the extremes of its column over all sites that have a figure.
 * @param criterion the criterion of the column.
 * @param table sites × criteria.
 * @param column the criterion's place in the table.
 * @throws RangeError when the criterion cannot be weighed.
 */
export function spanOf(criterion: Criterion, table: FigureTable, column: number): Span {
  assertCriterion(criterion);
  if (criterion.levels.kind === 'fixed') {
    return { kind: 'span', worst: criterion.levels.worst, best: criterion.levels.best };
  }
  let lowest = Infinity;
  let highest = -Infinity;
  for (let at = column; at < table.figures.length; at += table.criterionCount) {
    if (table.states[at] !== CELL.figure) continue;
    const figure = table.figures[at] ?? 0;
    if (figure < lowest) lowest = figure;
    if (figure > highest) highest = figure;
  }
  if (lowest > highest) return { kind: 'empty' };
  if (lowest === highest) return { kind: 'flat', figure: lowest };
  return criterion.direction === 'more'
    ? { kind: 'span', worst: lowest, best: highest }
    : { kind: 'span', worst: highest, best: lowest };
}

/**
 * Straight value function: v = (x − worst)/(best − worst), clamped to 0…1 outside the levels.
 * @param figure x, in the criterion's own unit.
 * @param span the levels; a flat or empty span gives 0.
 * @returns 0 at the worst level, 1 at the best.
 * @see references.ts `keeneyRaiffa`; checked beside a general-purpose scale in tests/core/decision/value.test.ts
 */
export function straightValue(figure: number, span: Span): number {
  if (span.kind !== 'span') return 0;
  // Halved so that the difference of two figures near the greatest double cannot overflow.
  const value = (figure / 2 - span.worst / 2) / (span.best / 2 - span.worst / 2);
  return value <= 0 ? 0 : value >= 1 ? 1 : value;
}

/**
 * The value of a figure: how far it lies from the worst level to the best, shaped.
 * @param figure x, in the criterion's own unit.
 * @param span the levels; a flat or empty span gives 0.
 * @param shape straight where none is said.
 * @returns 0…1.
 */
export function valueOf(figure: number, span: Span, shape: Shape = STRAIGHT): number {
  return shapedValue(straightValue(figure, span), shape);
}

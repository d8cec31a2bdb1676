import type { Prepared } from './prepare.ts';
import type { RandomStream } from './random.ts';
import type { Shape } from './shape.ts';
import { valueOf, type Span } from './value.ts';

/** A figure known only as low ≤ likely ≤ high, in the criterion's own unit; places are those of the table. */
export interface UncertainFigure {
  site: number;
  criterion: number;
  low: number;
  likely: number;
  high: number;
}

/** An uncertain figure ready to be drawn. */
interface Cell {
  at: number;
  low: number;
  high: number;
  /** (likely − low)/(high − low), less a half. */
  skew: number;
  span: Span;
  shape: Shape;
}

/** Writes one draw of every uncertain figure, as a value, into a table of values. */
export type DrawValues = (values: Float64Array, random: RandomStream) => void;

/**
 * Makes the sampler of uncertain figures: triangular on low, likely, high, then valued between the levels of `prepared`,
 * which stay where the likely figures put them.
 * A triangular figure with mode m on 0…1 is (1 − m) min(U, V) + m max(U, V), here as ½(U + V) + (m − ½)|U − V|: no
 * root and no branch. A figure whose low is its high is left alone.
 * @throws RangeError when low ≤ likely ≤ high does not hold.
 * @see references.ts `steinKeblis`; checked beside the closed form of its distribution in tests/core/decision/uncertain.test.ts
 */
export function valueSampler(prepared: Prepared, figures: readonly UncertainFigure[]): DrawValues {
  const cells = figures.filter(({ low, high }) => low !== high).map((figure) => cellOf(prepared, figure));
  const uniforms = new Float64Array(2 * cells.length);
  return (values, random) => {
    random.fill(uniforms);
    for (let k = 0; k < cells.length; k++) {
      const cell = cells[k];
      if (cell === undefined) continue;
      const u = uniforms[2 * k] ?? 0;
      const v = uniforms[2 * k + 1] ?? 0;
      const t = 0.5 * (u + v) + cell.skew * Math.abs(u - v);
      // Not low + (high − low) t: the difference of two figures near the greatest double overflows.
      values[cell.at] = valueOf(cell.low * (1 - t) + cell.high * t, cell.span, cell.shape);
    }
  };
}

/** The values of a table with every uncertain figure at whichever end is worth more. */
export function highestValues(prepared: Prepared, figures: readonly UncertainFigure[]): Float64Array {
  const highest = prepared.values.slice();
  for (const figure of figures) {
    const { at, low, high } = endValues(prepared, figure);
    highest[at] = Math.max(low, high);
  }
  return highest;
}

/**
 * What an uncertain figure is worth at either end, between the levels of `prepared`.
 * @returns values 0…1, and the place of the cell in the table.
 * @throws RangeError when low ≤ likely ≤ high does not hold.
 */
export function endValues(prepared: Prepared, figure: UncertainFigure) {
  const { at, low, high, span, shape } = cellOf(prepared, figure);
  return { at, low: valueOf(low, span, shape), high: valueOf(high, span, shape) };
}

function cellOf({ table, spans, shapes }: Prepared, figure: UncertainFigure): Cell {
  const { site, criterion, low, likely, high } = figure;
  const [span, shape] = [spans[criterion], shapes[criterion]];
  if (!(low <= likely && likely <= high) || span === undefined || shape === undefined)
    throw new RangeError(`uncertain: ${low}, ${likely}, ${high} for criterion ${criterion} cannot be drawn`);
  const skew = (likely / 2 - low / 2) / (high / 2 - low / 2) - 0.5;
  return { at: site * table.criterionCount + criterion, low, high, skew, span, shape };
}

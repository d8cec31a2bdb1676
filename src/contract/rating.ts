/* How a rating's figure is written, on screens, in messages and in the memo. */
import { formatNumber } from './format.ts';

interface Stepped {
  /** Names of a rating's steps 0 to 4; null where it is no rating. */
  steps: readonly string[] | null;
}

/** A rating's figure by its step's name and number, "Good (3)"; null where it is no rating or on no step. */
export function stepInWords({ steps }: Stepped, figure: number): string | null {
  const name = steps?.[figure];
  return name === undefined ? null : `${name} (${formatNumber(figure)})`;
}

/** A criterion's figure as it is read: a rating by its step, any other number with its column's decimals. */
export const figureText = (criterion: Stepped, figure: number, decimals: number): string =>
  stepInWords(criterion, figure) ?? formatNumber(figure, decimals);

/* What may be entered for a criterion: by hand, from a file or over the interface. */

/** Steps of a rating run from 0 to this. */
const LAST_STEP = 4;

/** A figure with its uncertainty, in the criterion's unit. A part that is not given is undefined. */
export interface EnteredFigure {
  /** The figure itself, which counts where one figure is wanted; undefined where there is none. */
  readonly likely: number | undefined;
  readonly low?: number | undefined;
  readonly high?: number | undefined;
}

export type FigurePart = 'low' | 'likely' | 'high';

/** What is wrong with an entered figure, and in which part of it. */
export interface FigureFault {
  readonly part: FigurePart;
  readonly kind: 'no-figure' | 'no-step' | 'low-above' | 'high-below';
}

/**
 * Checks an entered figure: low ≤ likely ≤ high, no low or high without a figure, and a rating on its whole steps
 * 0 to 4. Low and high may each stand alone.
 *
 * @param rating whether the criterion is a rating
 * @returns every fault, in the order low, likely, high; none for a figure that may stand
 */
export function figureFaults({ low, likely, high }: EnteredFigure, rating: boolean): FigureFault[] {
  const parts = { low, likely, high };
  const faults: FigureFault[] = [];
  for (const part of ['low', 'likely', 'high'] as const) {
    const value = parts[part];
    if (value === undefined) continue;
    if (rating && !isStep(value)) faults.push({ part, kind: 'no-step' });
    else if (likely === undefined) faults.push({ part, kind: 'no-figure' });
    else if (part === 'low' && value > likely) faults.push({ part, kind: 'low-above' });
    else if (part === 'high' && value < likely) faults.push({ part, kind: 'high-below' });
  }
  return faults;
}

const isStep = (value: number): boolean => Number.isInteger(value) && value >= 0 && value <= LAST_STEP;

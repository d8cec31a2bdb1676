/** How shares of draws are written, on screens, in exports and in the memo: one way, so that they agree. */
import { standardError } from '#core/decision/acceptability.ts';
import { closedSums } from '#core/printed/closing.ts';
import { formatNumber } from './format.ts';

const DECIMALS = 1;
const LEAST_PRINTED = 0.0005;

/** "under 1/10,000": all that draws can say of what none of them showed. */
export const underOneIn = (samples: number): string => `under 1/${formatNumber(samples)}`;

/**
 * A share of draws in percent, without its sign: "95.2". One that would be printed as 0.0 or 100.0 and is neither is
 * "< 0.1" or "> 99.9"; one that no draw showed is "under 1/10,000".
 */
export function shareFigure(share: number, samples: number): string {
  if (share === 0) return underOneIn(samples);
  if (share < LEAST_PRINTED) return '< 0.1';
  if (share < 1 && share >= 1 - LEAST_PRINTED) return '> 99.9';
  return formatNumber(share * 100, DECIMALS);
}

/** The same within a sentence: "95.2 %", "under 1/10,000". */
export function shareInWords(share: number, samples: number): string {
  const figure = shareFigure(share, samples);
  return share === 0 ? figure : `${figure} %`;
}

/** The standard error of a share in percentage points: "0.21"; where the share is 0 or 1, "under 1/10,000". */
export function errorFigure(share: number, samples: number): string {
  if (share === 0 || share === 1) return underOneIn(samples);
  return formatNumber(standardError(share, samples) * 100, 2);
}

const WEIGHT_DECIMALS = 3;

/** Weights that belong together, printed so that they add up to their sum. */
export function weightFigures(weights: readonly number[]): string[] {
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  const { sums } = closedSums([{ parts: weights, total }], WEIGHT_DECIMALS, WEIGHT_DECIMALS);
  return (sums[0]?.parts ?? weights).map((weight) => formatNumber(weight, WEIGHT_DECIMALS));
}

import type { PairwiseInput, PairwiseOutput } from '#contract/compare.ts';
import { compare } from '#core/decision/pairwise.ts';

/** Weights from judgements, and how far these agree with one another. */
export function compareCriteria({ matrix }: PairwiseInput): PairwiseOutput {
  const { weights, ...rest } = compare(matrix);
  return { weights: [...weights], ...rest };
}

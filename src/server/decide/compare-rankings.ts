import type { ConcordanceInput, ConcordanceOutput } from '#contract/compare.ts';
import { concordance } from '#core/decision/concordance.ts';

/** Agreement among judges; null where it is undefined. */
export function compareRankings({ rankings }: ConcordanceInput): ConcordanceOutput {
  const agreement = concordance(rankings);
  return { w: agreement.kind === 'agreement' ? agreement.w : null };
}

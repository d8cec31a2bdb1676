import type { Weights } from '#contract/weights.ts';

/** Whether a lead chose the study's weights from members' sets, with a written reason that a change lets go of. */
export const isChosen = ({ weights, origin }: Weights): boolean =>
  weights === 'study' && origin !== null && origin.kind !== 'apart';

import type { Study } from '#contract/study.ts';

/** Why the person looking may not change the study's inputs; none where they may. */
export function inputLock({
  role,
  state,
  archived,
}: Pick<Study, 'role' | 'state' | 'archived'>): string | undefined {
  if (archived) return 'The study is archived. A lead restores it before anything is changed.';
  if (role === 'reviewer' || role === 'reader')
    return `You are a ${role} in this study: leads and engineers write the inputs.`;
  if (state === 'in-review') return 'The study is in review: its inputs are locked until the review ends.';
  if (state === 'baselined' && role !== 'lead')
    return 'The study is baselined: a lead makes the next change, which returns it to draft.';
  return undefined;
}

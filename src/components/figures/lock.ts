import type { StudyRole, StudyState } from '#contract/study.ts';

/** Why entered figures cannot be changed by this person now; undefined where they can. */
export function figureLockOf({
  role,
  state,
  archived,
}: {
  role: StudyRole;
  state: StudyState;
  archived: boolean;
}): string | undefined {
  if (archived) return 'The study is archived. Restore it to change figures.';
  if (role === 'reader' || role === 'reviewer') return 'Figures are an engineer’s or a lead’s to enter.';
  if (state === 'in-review') return 'In review: figures are locked until the study returns to draft.';
  if (state === 'baselined' && role !== 'lead') return 'After a baseline the lead makes the next change.';
  return undefined;
}

import type { StudyRole, StudyState } from '#contract/study.ts';
import type { WeightsOf } from '#contract/weights.ts';

/** Who looks, and at a study in what state. */
export interface Viewer {
  role: StudyRole;
  state: StudyState;
  archived: boolean;
}

/** Why a set of weights cannot be changed by this person now; undefined where it can. */
export function lockOf({ role, state, archived }: Viewer, whose: WeightsOf): string | undefined {
  if (archived) return 'The study is archived. Restore it to change weights.';
  if (role === 'reader') return 'A reader looks on; weights are set by the lead.';
  if (whose === 'mine') return undefined;
  if (role !== 'lead') return 'A lead sets the study’s weights. Your own stand under “Mine”.';
  return state === 'in-review'
    ? 'In review: the study’s weights are locked until it returns to draft.'
    : undefined;
}

/** Why criteria and figures cannot be changed by this person now; undefined where they can. */
export function inputLockOf({ role, state, archived }: Viewer): string | undefined {
  if (archived) return 'The study is archived. Restore it to change criteria.';
  if (role === 'reader' || role === 'reviewer') return 'Criteria are an engineer’s or a lead’s to change.';
  if (state === 'in-review') return 'In review: criteria are locked until the study returns to draft.';
  if (state === 'baselined' && role !== 'lead') return 'After a baseline the lead makes the next change.';
  return undefined;
}

/* What a person tries on this screen and has not saved: the changes, and the steps that led to them. */
import { NO_CHANGES } from '#contract/what-if-model.ts';
import type { ChangeLine } from '#contract/what-if-words.ts';
import type { WhatIf, WhatIfChanges } from '#contract/what-if.ts';

/** One step, and how the changes stood before it. */
export interface Step {
  /** Steps with the same key run on into one: a slider that is dragged. */
  key: string;
  /** What it was, for the undo button: "points for Cost". */
  label: string;
  before: WhatIfChanges;
}

export interface Draft {
  /** The what-if it is of; null for a new one. */
  whatIfId: string | null;
  /** The version it was begun on: a newer one must not be written over unseen. */
  version: number;
  /** The study's revision it was begun on. */
  revision: number;
  name: string;
  changes: WhatIfChanges;
  steps: readonly Step[];
}

type Kept = Pick<WhatIf, 'id' | 'name' | 'version' | 'changes'>;

export const draftOf = (kept: Kept | null, revision: number): Draft => ({
  whatIfId: kept?.id ?? null,
  version: kept?.version ?? 0,
  revision,
  name: kept?.name ?? '',
  changes: kept?.changes ?? NO_CHANGES,
  steps: [],
});

/** Takes a step; one with the key of the last runs on into it. */
export function stepped(draft: Draft, { key, label }: Omit<Step, 'before'>, changes: WhatIfChanges): Draft {
  const last = draft.steps.at(-1);
  const steps = last?.key === key ? draft.steps : [...draft.steps, { key, label, before: draft.changes }];
  return { ...draft, changes, steps };
}

/** The last step taken back. */
export function undone(draft: Draft): Draft {
  const last = draft.steps.at(-1);
  return last ? { ...draft, changes: last.before, steps: draft.steps.slice(0, -1) } : draft;
}

/** Whether a draft holds what is kept nowhere else. */
export function isUnsaved({ name, changes }: Draft, kept: Kept | null): boolean {
  const before = kept ?? { name: '', changes: NO_CHANGES };
  return name.trim() !== before.name || JSON.stringify(changes) !== JSON.stringify(before.changes);
}

type Limit = NonNullable<WhatIfChanges['limits'][string]> | null;
type Tried = WhatIfChanges['figures'][number];

/** What can be tried, added to what is tried already. */
export const change = {
  limit: (changes: WhatIfChanges, criterionId: string, limit: Limit): WhatIfChanges => ({
    ...changes,
    limits: { ...changes.limits, [criterionId]: limit },
  }),
  figure: (changes: WhatIfChanges, tried: Tried): WhatIfChanges => ({
    ...changes,
    figures: [...changes.figures.filter((one) => !isOf(one, tried)), tried],
  }),
  leaveOut: (changes: WhatIfChanges, siteId: string): WhatIfChanges => ({
    ...changes,
    leftOut: [...changes.leftOut.filter((id) => id !== siteId), siteId],
  }),
};

/** The changes without one of them: there the study's own counts again. */
export function takenBack(changes: WhatIfChanges, at: ChangeLine['at']): WhatIfChanges {
  switch (at.kind) {
    case 'weights':
      return { ...changes, weights: null };
    case 'limit': {
      const { [at.criterionId]: _back, ...limits } = changes.limits;
      return { ...changes, limits };
    }
    case 'figure':
      return { ...changes, figures: changes.figures.filter((one) => !isOf(one, at)) };
    case 'left-out':
      return { ...changes, leftOut: changes.leftOut.filter((id) => id !== at.siteId) };
  }
}

const isOf = (a: Pick<Tried, 'siteId' | 'criterionId'>, b: Pick<Tried, 'siteId' | 'criterionId'>): boolean =>
  a.siteId === b.siteId && a.criterionId === b.criterionId;

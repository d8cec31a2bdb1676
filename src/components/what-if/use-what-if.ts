import { useCallback, useState } from 'react';
import type { ApiError } from '#components/live/api.ts';
import { useApi } from '#components/live/hooks.ts';
import { useStudyEvents, type LiveEvent } from '#components/live/study-events.ts';
import { useViewParam } from '#components/ranking/use-view-param.ts';
import type { WhatIf, WhatIfChanges, WhatIfList } from '#contract/what-if.ts';
import { draftOf, isUnsaved, stepped, undone, type Draft, type Step } from './draft.ts';
import { keepDraft, useKeptDraft } from './draft-store.ts';

export interface LiveWhatIf {
  /** Where the study's what-ifs are read and written. */
  address: string;
  /** Own and shared ones, latest change first; undefined until they are read. */
  list: WhatIfList | undefined;
  listError: ApiError | undefined;
  readAgain: () => Promise<unknown>;
  /** The one chosen, as the server keeps it; null for a new one. */
  kept: WhatIf | null;
  /** Still being read: the address names one that is not here yet. */
  waiting: boolean;
  /** The address names one that this person cannot see, or that was let go. */
  gone: boolean;
  draft: Draft;
  unsaved: boolean;
  /** The study has another revision than when this was begun or last looked at. */
  movedOn: boolean;
  lookOn: () => void;
  step: (step: Omit<Step, 'before'>, changes: WhatIfChanges) => void;
  undo: () => void;
  rename: (name: string) => void;
  /** Goes on with these changes from another version. */
  rebase: (version: number) => void;
  /** Shows another, or a new one, against a revision of the study; what is not saved of this one is lost. */
  open: (whatIfId: string | null, revision?: number) => void;
}

/** The what-if that the address names, or a new one, and what is tried on it on this screen. */
export function useWhatIf(studyId: string, revision: number): LiveWhatIf {
  const address = `/api/v1/studies/${studyId}/what-ifs`;
  const [id, setId] = useViewParam('what-if');
  const { data: list, error: listError, mutate } = useApi<WhatIfList>(`${address}?pageSize=500`);
  const listed = list?.items.find((one) => one.id === id);
  // Past the first page one may still be there; otherwise what is not listed is gone.
  const further = id !== null && list !== undefined && !listed && list.total > list.items.length;
  const single = useApi<WhatIf>(further ? `${address}/${id}` : null);
  const kept = listed ?? (id !== null && single.data?.id === id ? single.data : null);
  const stored = useKeptDraft(studyId);
  const [seen, setSeen] = useState(revision);
  const draft = stored?.whatIfId === id ? stored : draftOf(kept, seen);
  const hear = useCallback(
    (event: LiveEvent) => {
      if (event.kind === 'gap' || event.change.objects.includes('what-if')) void mutate();
    },
    [mutate],
  );
  useStudyEvents(studyId, hear);
  const keep = (next: Draft): void => keepDraft(studyId, isUnsaved(next, kept) ? next : null);
  const unlisted = list !== undefined && !further;
  const gone = id !== null && !kept && (unlisted || single.error !== undefined);
  return {
    address,
    list,
    listError,
    readAgain: () => mutate(),
    kept,
    waiting: id !== null && !kept && !gone && listError === undefined,
    gone,
    draft,
    unsaved: isUnsaved(draft, kept),
    movedOn: draft.revision !== revision,
    lookOn: () => {
      setSeen(revision);
      if (draft === stored) keep({ ...draft, revision });
    },
    step: (step, changes) => keep(stepped(draft, step, changes)),
    undo: () => keep(undone(draft)),
    rename: (name) => keep({ ...draft, name }),
    rebase: (version) => keep({ ...draft, version }),
    open: (whatIfId, against = revision) => {
      keepDraft(studyId, null);
      setSeen(against);
      setId(whatIfId);
    },
  };
}

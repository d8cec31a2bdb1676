import { useCallback, useState } from 'react';
import { ApiError, send } from '#components/live/api.ts';
import { useApi } from '#components/live/hooks.ts';
import { announceSaved, announceSaving, type Saved } from '#components/live/saved.ts';
import { useStudyEvents, type LiveEvent } from '#components/live/study-events.ts';
import type { Criterion, CriterionList } from '#contract/criterion.ts';

export interface Criteria {
  items: readonly Criterion[];
  /** Takes in a criterion as the server now holds it. */
  take: (criterion: Criterion) => void;
  move: (criterion: Criterion, position: number) => Promise<void>;
  remove: (criterion: Criterion) => Promise<boolean>;
  again: () => void;
  /** A move or removal that did not go through. */
  failure: ApiError | null;
  forget: () => void;
}

const ALL = 500;

/** A study's criteria in their order, kept up with everyone's changes. */
export function useCriteria(studyId: string, initial: readonly Criterion[]): Criteria {
  const address = `/api/v1/studies/${studyId}/criteria`;
  const fallbackData: CriterionList = { items: [...initial], total: initial.length };
  const { data, mutate } = useApi<CriterionList>(`${address}?pageSize=${ALL}`, { fallbackData });
  const [failure, setFailure] = useState<ApiError | null>(null);
  const hear = useCallback(
    (event: LiveEvent) => {
      // A group that is taken away leaves its criteria in none.
      const ours = ['criterion', 'criterion-group'];
      if (event.kind === 'gap' || event.change.objects.some((object) => ours.includes(object))) void mutate();
    },
    [mutate],
  );
  useStudyEvents(studyId, hear);

  const attempt = async (write: () => Promise<Saved | undefined>): Promise<boolean> => {
    setFailure(null);
    announceSaving();
    try {
      const saved = await write();
      if (saved) announceSaved(saved);
      return true;
    } catch (error) {
      if (!(error instanceof ApiError)) throw error;
      setFailure(error);
      return false;
    } finally {
      await mutate();
    }
  };
  return {
    items: data?.items ?? initial,
    take: (criterion) =>
      void mutate((now) => now && { ...now, items: withCriterion(now.items, criterion) }, {
        revalidate: false,
      }),
    move: async ({ id, version }, position) => {
      await attempt(() => send<Criterion & Saved>('PATCH', `${address}/${id}`, { position, version }));
    },
    remove: ({ id, version }) =>
      attempt(() => send<undefined>('DELETE', `${address}/${id}`, undefined, { ifMatch: `"${version}"` })),
    again: () => void mutate(),
    failure,
    forget: () => setFailure(null),
  };
}

function withCriterion(items: readonly Criterion[], criterion: Criterion): Criterion[] {
  const known = items.some(({ id }) => id === criterion.id);
  return known ? items.map((one) => (one.id === criterion.id ? criterion : one)) : [...items, criterion];
}

import { useCallback } from 'react';
import { ApiError, send } from '#components/live/api.ts';
import { useApi } from '#components/live/hooks.ts';
import { announceSaved, type Saved } from '#components/live/saved.ts';
import { useStudyEvents, type LiveEvent } from '#components/live/study-events.ts';
import type { CriterionGroup, CriterionGroupList } from '#contract/criterion.ts';

export interface Groups {
  items: readonly CriterionGroup[];
  /** @returns the group, or why there is none */
  add: (name: string) => Promise<CriterionGroup | ApiError>;
  rename: (group: CriterionGroup, name: string) => Promise<ApiError | null>;
  remove: (group: CriterionGroup) => Promise<ApiError | null>;
}

const ALL = 500;

/** A study's groups of criteria, kept up with everyone's changes. */
export function useGroups(studyId: string, initial: readonly CriterionGroup[]): Groups {
  const address = `/api/v1/studies/${studyId}/criterion-groups`;
  const fallbackData: CriterionGroupList = { items: [...initial], total: initial.length };
  const { data, mutate } = useApi<CriterionGroupList>(`${address}?pageSize=${ALL}`, { fallbackData });
  const hear = useCallback(
    (event: LiveEvent) => {
      if (event.kind === 'gap' || event.change.objects.includes('criterion-group')) void mutate();
    },
    [mutate],
  );
  useStudyEvents(studyId, hear);

  const attempt = async <T>(write: () => Promise<T>): Promise<T | ApiError> => {
    try {
      return await write();
    } catch (error) {
      if (!(error instanceof ApiError)) throw error;
      return error;
    } finally {
      await mutate();
    }
  };
  const refusal = (outcome: unknown): ApiError | null => (outcome instanceof ApiError ? outcome : null);
  return {
    items: data?.items ?? initial,
    add: (name) =>
      attempt(async () => {
        const made = await send<CriterionGroup & Saved>('POST', address, { name });
        announceSaved(made);
        return made;
      }),
    rename: async ({ id, version }, name) =>
      refusal(
        await attempt(async () => {
          announceSaved(await send<CriterionGroup & Saved>('PATCH', `${address}/${id}`, { name, version }));
        }),
      ),
    remove: async ({ id, version }) =>
      refusal(
        await attempt(() =>
          send<undefined>('DELETE', `${address}/${id}`, undefined, { ifMatch: `"${version}"` }),
        ),
      ),
  };
}

import { useCallback, useMemo } from 'react';
import { useApi } from '#components/live/hooks.ts';
import { useStudyEvents, type LiveEvent } from '#components/live/study-events.ts';
import type { CriterionGroupList } from '#contract/criterion.ts';
import type { Names } from './words.ts';

/** Names of the criteria given and of the study's groups, by id. */
export function useNames(studyId: string, criteria: readonly { id: string; name: string }[]): Names {
  const { data, mutate } = useApi<CriterionGroupList>(
    `/api/v1/studies/${studyId}/criterion-groups?pageSize=500`,
  );
  const hear = useCallback(
    (event: LiveEvent) => {
      if (event.kind === 'gap' || event.change.objects.includes('criterion-group')) void mutate();
    },
    [mutate],
  );
  useStudyEvents(studyId, hear);
  return useMemo(
    () => new Map([...criteria, ...(data?.items ?? [])].map(({ id, name }) => [id, name])),
    [criteria, data],
  );
}

import { useCallback } from 'react';
import type { ApiError } from '#components/live/api.ts';
import { useApi } from '#components/live/hooks.ts';
import { useStudyEvents, type LiveEvent } from '#components/live/study-events.ts';
import type { MemberWeights, MemberWeightsList } from '#contract/weights.ts';

export interface MembersSets {
  /** Everyone who may weigh; null until it has been read. */
  items: readonly MemberWeights[] | null;
  error: ApiError | undefined;
  again: () => void;
}

const MOVING = ['own-weights', 'weights', 'criterion', 'criterion-group', 'member'];

/** Members' sets of weights as far as they are shared, kept up with everyone's changes. */
export function useMembersSets(studyId: string): MembersSets {
  const { data, error, mutate } = useApi<MemberWeightsList>(`/api/v1/studies/${studyId}/weights/members`);
  const hear = useCallback(
    (event: LiveEvent) => {
      const moved = event.kind === 'gap' || event.change.objects.some((object) => MOVING.includes(object));
      if (moved) void mutate();
    },
    [mutate],
  );
  useStudyEvents(studyId, hear);
  return { items: data?.items ?? null, error, again: () => void mutate() };
}

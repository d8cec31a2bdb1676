import { useCallback } from 'react';
import { useApi } from '#components/live/hooks.ts';
import { useStudyEvents, type LiveEvent } from '#components/live/study-events.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';

/** The study's orbits, vehicle and settings, kept fresh; its sites come from the table, edits included. */
export function useInputs(studyId: string, initial: StudyInputs | null): StudyInputs | null {
  const { data, mutate } = useApi<StudyInputs>(`/api/v1/studies/${studyId}/evaluation/inputs`, {
    ...(initial ? { fallbackData: initial, revalidateOnMount: false } : {}),
    revalidateOnFocus: false,
  });
  useStudyEvents(
    studyId,
    useCallback(
      (event: LiveEvent) => {
        if (
          event.kind === 'gap' ||
          event.change.objects.some((object) => /orbit|vehicle|settings/.test(object))
        )
          void mutate();
      },
      [mutate],
    ),
  );
  return data ?? initial;
}

import { useCallback, useState } from 'react';
import { send } from '#components/live/api.ts';
import { useAction, useApi } from '#components/live/hooks.ts';
import { announceSaved, type Saved } from '#components/live/saved.ts';
import { useStudyEvents, type LiveEvent } from '#components/live/study-events.ts';
import type { LossesSource, StudySettings } from '#contract/requirement.ts';

/** The study's choice between entered and flown losses. @param initial as the page was drawn with */
export function useLosses(studyId: string, initial: StudySettings) {
  const address = `/api/v1/studies/${studyId}/settings`;
  const { data, mutate } = useApi<StudySettings>(address, {
    fallbackData: initial,
    revalidateOnMount: false,
    revalidateOnFocus: false,
  });
  const onEvent = useCallback(
    (event: LiveEvent) => {
      if (event.kind === 'gap' || event.change.objects.includes('settings')) void mutate();
    },
    [mutate],
  );
  useStudyEvents(studyId, onEvent);
  const { busy, error, run } = useAction();
  /** Shown in the control while it is on its way. */
  const [wanted, setWanted] = useState<LossesSource | null>(null);
  const kept = data ?? initial;
  const choose = async (losses: LossesSource): Promise<void> => {
    setWanted(losses);
    const done = await run(async () => {
      const saved = await send<StudySettings & Saved>('PATCH', address, { losses, version: kept.version });
      announceSaved(saved);
      await mutate(saved, { revalidate: false });
    });
    // Refused because somebody else changed the settings: what holds now is shown, and can be chosen from.
    if (!done) await mutate();
    setWanted(null);
  };
  return { losses: kept.losses, shown: wanted ?? kept.losses, busy, error, choose };
}

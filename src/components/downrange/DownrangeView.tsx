import { useCallback } from 'react';
import { useApi } from '#components/live/hooks.ts';
import { useStudyEvents, type LiveEvent } from '#components/live/study-events.ts';
import { Button, ButtonLink, EmptyState, Finding, Notice } from '#components/ui/index.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';
import { ScreeningCaution } from './DataLimits.tsx';
import { DownrangeSheet, type DownrangeSheetProps } from './DownrangeSheet.tsx';

interface DownrangeViewProps extends Omit<DownrangeSheetProps, 'inputs'> {
  /** Null where the study is too large to draw on the server: then the island reads it. */
  initial: StudyInputs | null;
}

/** The Downrange section: corridor, fan and surroundings of one site at a time. */
export function DownrangeView({ initial, ...props }: DownrangeViewProps) {
  const { studyId } = props;
  const { data, error, mutate } = useApi<StudyInputs>(`/api/v1/studies/${studyId}/evaluation/inputs`, {
    ...(initial ? { fallbackData: initial, revalidateOnMount: false } : {}),
    revalidateOnFocus: false,
  });
  useStudyEvents(
    studyId,
    useCallback(
      (event: LiveEvent) => {
        if (
          event.kind === 'gap' ||
          event.change.objects.some((object) => /site|orbit|vehicle|settings|upload/.test(object))
        )
          void mutate();
      },
      [mutate],
    ),
  );
  if (error && !data)
    return (
      <Notice
        fact="The study could not be read."
        actions={<Button onClick={() => void mutate()}>Try again</Button>}
      >
        {error.message} Nothing was changed.
      </Notice>
    );
  if (!data) return <p role="status">Reading the study…</p>;
  if (data.sites.length === 0)
    return (
      <>
        <Finding>No sites yet.</Finding>
        <EmptyState
          fact="No sites yet."
          actions={<ButtonLink href={`/studies/${studyId}/sites`}>Add candidate sites</ButtonLink>}
        >
          Downrange draws the corridor of a site at a launch azimuth. Add candidates in Sites, or upload a
          CSV.
        </EmptyState>
        <div className="mt-10">
          <ScreeningCaution />
        </div>
      </>
    );
  return <DownrangeSheet {...props} inputs={data} />;
}

import { useCallback, useMemo, useState } from 'react';
import { Button, ButtonLink, EmptyState, Finding, Notice, Stale } from '#components/ui/index.ts';
import { useApi } from '#components/live/hooks.ts';
import { useStudyEvents, type LiveEvent } from '#components/live/study-events.ts';
import type { StudySettings } from '#contract/requirement.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';
import { computeFlights } from './compute.ts';
import { FlightSheets } from './FlightSheets.tsx';
import type { FlownLocks } from './flown/LossesBar.tsx';

interface FlightViewProps {
  studyId: string;
  /** Null where the study is too large to draw on the server: then the island reads it. */
  initial: StudyInputs | null;
  /** From the address: the orbit's and the site's code. */
  orbitCode: string | null;
  siteCode: string | null;
  settings: StudySettings;
  locks: FlownLocks;
}

/** What is missing before anything can be flown. */
function Missing({ studyId, inputs }: { studyId: string; inputs: StudyInputs }) {
  const noOrbits = inputs.orbits.length === 0;
  const [fact, section, action] = noOrbits
    ? (['No target orbits yet.', 'requirement', 'Add target orbits'] as const)
    : (['No sites yet.', 'sites', 'Add candidate sites'] as const);
  return (
    <>
      <Finding>{fact}</Finding>
      <EmptyState
        fact={fact}
        actions={<ButtonLink href={`/studies/${studyId}/${section}`}>{action}</ButtonLink>}
      >
        {noOrbits
          ? 'Flight works out every site for every target orbit. Add the launch manifest in Requirement.'
          : 'Flight works out every site for every target orbit. Add candidates in Sites, or upload a CSV.'}
      </EmptyState>
    </>
  );
}

/** The Flight section: sites × orbits, worked out in the browser by the code that the server runs. */
export function FlightView({ initial, ...props }: FlightViewProps) {
  const { studyId } = props;
  const address = `/api/v1/studies/${studyId}/evaluation/inputs`;
  const { data, error, isLoading, mutate } = useApi<StudyInputs>(address, {
    ...(initial ? { fallbackData: initial, revalidateOnMount: false } : {}),
    revalidateOnFocus: false,
  });
  const [behind, setBehind] = useState(false);
  const onEvent = useCallback(
    (event: LiveEvent) => {
      if (
        event.kind === 'change' &&
        !event.change.objects.some((o) => /site|orbit|vehicle|settings|upload/.test(o))
      )
        return;
      setBehind(true);
      void mutate().finally(() => setBehind(false));
    },
    [mutate],
  );
  useStudyEvents(studyId, onEvent);
  const results = useMemo(() => (data ? computeFlights(data) : []), [data]);
  if (error && !data)
    return (
      <Notice
        fact="The study could not be read."
        actions={<Button onClick={() => void mutate()}>Try again</Button>}
      >
        {error.message} Nothing was changed.
      </Notice>
    );
  if (!data || isLoading) return <p role="status">Reading the study…</p>;
  if (data.orbits.length === 0 || data.sites.length === 0) return <Missing studyId={studyId} inputs={data} />;
  return (
    <>
      {behind && <Stale revision={data.revision} />}
      <FlightSheets {...props} inputs={data} results={results} />
    </>
  );
}

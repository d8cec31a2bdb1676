import { useCallback, useMemo, useState } from 'react';
import {
  Button,
  ButtonLink,
  Caution,
  EmptyState,
  Finding,
  Notice,
  Stale,
  Tabs,
} from '#components/ui/index.ts';
import { useAddressParam } from '#components/live/address.ts';
import { useApi, useFinding, useStep } from '#components/live/hooks.ts';
import { useStudyEvents, type LiveEvent } from '#components/live/study-events.ts';
import { formatCount, formatNumber } from '#contract/format.ts';
import type { SiteResult } from '#contract/evaluate.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';
import { computeFlights } from './compute.ts';
import { manifestFinding, orbitFinding, type FlightFinding } from './finding.ts';
import { MANIFEST } from './heading.ts';
import { ManifestTable } from './ManifestTable.tsx';
import { OrbitSheet } from './OrbitSheet.tsx';
import { byTotal, manifestRows, rowsOf } from './rows.ts';
import { manifestFact, nameOf, orbitFact } from './words.ts';

interface FlightViewProps {
  studyId: string;
  /** Null where the study is too large to draw on the server: then the island reads it. */
  initial: StudyInputs | null;
  /** From the address: the orbit's and the site's code. */
  orbitCode: string | null;
  siteCode: string | null;
}

function Head({ finding, studyId }: { finding: FlightFinding; studyId: string }) {
  useFinding(finding.heading);
  return (
    <Finding
      why={
        <p>
          {finding.why} {finding.decides && <b>{finding.decides}</b>}
        </p>
      }
      actions={<ButtonLink href={`/api/v1/studies/${studyId}/evaluation`}>All results as JSON</ButtonLink>}
    >
      {finding.heading}
    </Finding>
  );
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

interface SheetsProps {
  studyId: string;
  inputs: StudyInputs;
  results: readonly SiteResult[];
  orbitCode: string | null;
  siteCode: string | null;
}

function Sheets({ studyId, inputs, results, orbitCode, siteCode }: SheetsProps) {
  const first = inputs.orbits[0]?.code ?? MANIFEST;
  const [orbit, setOrbit] = useAddressParam('orbit', orbitCode);
  const [site, setSite] = useAddressParam('site', siteCode);
  const known = orbit === MANIFEST || inputs.orbits.some(({ code }) => code === orbit);
  const value = known && orbit !== null ? orbit : first;
  const index = inputs.orbits.findIndex(({ code }) => code === value);
  const rows = useMemo(() => byTotal(rowsOf(inputs, results, index)), [inputs, results, index]);
  const year = useMemo(() => manifestRows(inputs, results), [inputs, results]);
  const shown = value === MANIFEST ? year : rows;
  // Without a choice in the address the first row is the chosen one: its azimuths and ways stand below.
  const chosen = inputs.sites.find(({ code }) => code === site)?.code ?? shown[0]?.site.code ?? '';
  useStep((step) => {
    const here = shown.findIndex((row) => row.site.code === chosen);
    const next = shown[(here + step + shown.length) % shown.length];
    if (next) setSite(next.site.code);
  });
  const inclination = rows[0]?.result.inclinationDeg ?? 0;
  const finding = value === MANIFEST ? manifestFinding(year, inputs.orbits) : orbitFinding(rows, inclination);
  const tabs = [
    ...inputs.orbits.map((one, i) => ({
      value: one.code,
      name: nameOf(one),
      fact: orbitFact(one, results[0]?.orbits[i]?.inclinationDeg ?? 0),
    })),
    { value: MANIFEST, name: 'Whole manifest', fact: manifestFact(inputs.orbits) },
  ];
  return (
    <>
      <Head finding={finding} studyId={studyId} />
      <Tabs label="Target orbit" tabs={tabs} value={value} onChange={setOrbit}>
        {value === MANIFEST ? (
          <ManifestTable
            rows={year}
            orbits={inputs.orbits}
            hasVehicle={inputs.vehicle !== null}
            chosenCode={chosen}
            onChoose={setSite}
          />
        ) : (
          <OrbitSheet
            inputs={inputs}
            results={results}
            rows={rows}
            orbitIndex={index}
            chosenCode={chosen}
            onChoose={setSite}
          />
        )}
      </Tabs>
      <div className="mt-10">
        <Caution>
          <b>Estimates for comparing sites, not flight data.</b> Closed-form Δv with entered losses; no ascent
          has been flown. {formatCount(inputs.sites.length * inputs.orbits.length, 'result')} of revision{' '}
          {formatNumber(inputs.revision)}.
        </Caution>
      </div>
    </>
  );
}

/** The Flight section: sites × orbits, worked out in the browser by the code that the server runs. */
export function FlightView({ studyId, initial, orbitCode, siteCode }: FlightViewProps) {
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
      <Sheets studyId={studyId} inputs={data} results={results} orbitCode={orbitCode} siteCode={siteCode} />
    </>
  );
}

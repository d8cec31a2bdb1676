import { useMemo } from 'react';
import { useAddressParam } from '#components/live/address.ts';
import { useFinding, useStep } from '#components/live/hooks.ts';
import { ButtonLink, Caution, Finding, Panel, Tabs } from '#components/ui/index.ts';
import type { SiteResult } from '#contract/evaluate.ts';
import { formatCount, formatNumber } from '#contract/format.ts';
import type { StudySettings } from '#contract/requirement.ts';
import type { InputOrbit, StudyInputs } from '#contract/study-inputs.ts';
import { manifestFinding, orbitFinding, type FlightFinding } from './finding.ts';
import { flownManifestFinding, flownOrbitFinding } from './flown/finding.ts';
import { FlownManifest } from './flown/FlownManifest.tsx';
import { FlownSheet } from './flown/FlownSheet.tsx';
import { LossesBar, type FlownLocks } from './flown/LossesBar.tsx';
import { useFlown } from './flown/use-flown.ts';
import { useLosses } from './flown/use-losses.ts';
import { MANIFEST } from './heading.ts';
import { ManifestTable } from './ManifestTable.tsx';
import { OrbitSheet } from './OrbitSheet.tsx';
import { byTotal, manifestRows, rowsOf } from './rows.ts';
import { manifestFact, nameOf, orbitFact } from './words.ts';

interface FlightSheetsProps {
  studyId: string;
  inputs: StudyInputs;
  results: readonly SiteResult[];
  orbitCode: string | null;
  siteCode: string | null;
  settings: StudySettings;
  locks: FlownLocks;
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

/** Where the figures of the sheet come from, and what they are not. */
function SheetCaution({ inputs, flown }: { inputs: StudyInputs; flown: boolean }) {
  return (
    <div className="mt-10">
      <Caution>
        <b>Estimates for comparing sites, not flight data.</b>{' '}
        {flown
          ? 'Losses and payload are those of each site’s flown ascent, a point mass in three degrees of freedom; the closed form with entered losses stands below them.'
          : 'Closed-form Δv with entered losses; flown ascents stand below it.'}{' '}
        {formatCount(inputs.sites.length * inputs.orbits.length, 'result')} of revision{' '}
        {formatNumber(inputs.revision)}.
      </Caution>
    </div>
  );
}

/** The orbit and site looked at, from the address. */
function useChoice({ inputs, results, orbitCode, siteCode }: FlightSheetsProps) {
  const first = inputs.orbits[0]?.code ?? MANIFEST;
  const [orbit, setOrbit] = useAddressParam('orbit', orbitCode);
  const [site, setSite] = useAddressParam('site', siteCode);
  const known = orbit === MANIFEST || inputs.orbits.some(({ code }) => code === orbit);
  const value = known && orbit !== null ? orbit : first;
  const index = inputs.orbits.findIndex(({ code }) => code === value);
  const rows = useMemo(() => byTotal(rowsOf(inputs, results, index)), [inputs, results, index]);
  const year = useMemo(() => manifestRows(inputs, results), [inputs, results]);
  return { value, index, rows, year, site, setOrbit, setSite };
}

const tabsOf = ({ orbits }: StudyInputs, results: readonly SiteResult[]) => [
  ...orbits.map((one: InputOrbit, i) => ({
    value: one.code,
    name: nameOf(one),
    fact: orbitFact(one, results[0]?.orbits[i]?.inclinationDeg ?? 0),
  })),
  { value: MANIFEST, name: 'Whole manifest', fact: manifestFact(orbits) },
];

/** Sites × orbits: the closed form, and the ascents flown; which of the two comes first is the study's setting. */
export function FlightSheets(props: FlightSheetsProps) {
  const { studyId, inputs, results, settings, locks } = props;
  const { value, index, rows, year, site, setOrbit, setSite } = useChoice(props);
  const { losses, shown: shownLosses, busy, error, choose } = useLosses(studyId, settings);
  const flown = useFlown(studyId, inputs, index);
  const first = losses === 'flown' && !flown.reading;
  const wholeManifest = value === MANIFEST;
  const closed = wholeManifest ? year : rows;
  const shown = !first ? closed : wholeManifest ? flown.years : flown.rows;
  // Without a choice in the address the first row is the chosen one: its azimuths and ways stand below.
  const chosen = inputs.sites.find(({ code }) => code === site)?.code ?? shown[0]?.site.code ?? '';
  useStep((step) => {
    const here = shown.findIndex((row) => row.site.code === chosen);
    const next = shown[(here + step + shown.length) % shown.length];
    if (next) setSite(next.site.code);
  });
  const closedFinding = wholeManifest
    ? manifestFinding(year, inputs.orbits)
    : orbitFinding(rows, rows[0]?.result.inclinationDeg ?? 0);
  const flownFinding = flown.orbit
    ? flownOrbitFinding(flown.rows, nameOf(flown.orbit))
    : flownManifestFinding(flown.years);
  const closedPart = wholeManifest ? (
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
  );
  const flownPart = flown.orbit ? (
    <FlownSheet
      studyId={studyId}
      inputs={inputs}
      results={results}
      orbit={flown.orbit}
      rows={flown.rows}
      reading={flown.reading}
      chosenCode={chosen}
      onChoose={setSite}
    />
  ) : (
    <Panel title="Flown ascents of the whole manifest">
      <FlownManifest years={flown.years} orbits={inputs.orbits} chosenCode={chosen} onChoose={setSite} />
    </Panel>
  );
  return (
    <>
      <Head finding={first ? flownFinding : closedFinding} studyId={studyId} />
      <LossesBar
        losses={shownLosses}
        onLosses={(next) => void choose(next)}
        saving={busy}
        refused={error?.message ?? null}
        locks={locks}
        ascents={flown.ascents}
        orbit={flown.orbit}
      />
      <Tabs label="Target orbit" tabs={tabsOf(inputs, results)} value={value} onChange={setOrbit}>
        {first ? (
          <>
            <div className="mt-5">{flownPart}</div>
            <div className="mt-10">
              <Panel title="Closed form with entered losses, to compare">{closedPart}</Panel>
            </div>
          </>
        ) : (
          <>
            {closedPart}
            {inputs.vehicle && <div className="mt-10">{flownPart}</div>}
          </>
        )}
      </Tabs>
      <SheetCaution inputs={inputs} flown={first} />
    </>
  );
}

import { lazy, Suspense, useDeferredValue, useMemo } from 'react';
import { useApi, useFinding, useStep } from '#components/live/hooks.ts';
import type { ApiError } from '#components/live/api.ts';
import { Button, Finding, Notice, Panel } from '#components/ui/index.ts';
import { computeFlights } from '#components/flight/compute.ts';
import type { StudyCorridor, StudyFan, StudySurroundings } from '#contract/downrange.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';
import { classOfStudyVehicle } from '#contract/vehicle-class.ts';
import { Controls } from './Controls.tsx';
import { CorridorFigures } from './CorridorFigures.tsx';
import { DataLimits, ScreeningCaution } from './DataLimits.tsx';
import { FanPanel } from './FanPanel.tsx';
import { addressesOf, flownAzimuths } from './launch.ts';
import { OpenSectors, type LimitsAddress } from './OpenSectors.tsx';
import { SettlementsTable } from './SettlementsTable.tsx';
import { Surroundings } from './Surroundings.tsx';
import { useLaunch, type DownrangeAddress } from './use-launch.ts';
import { useSettled } from './use-settled.ts';
import { corridorFinding, waitingFinding, zoneFinding } from './words.ts';

// The map's library is asked for once there is something to draw.
const DownrangeMap = lazy(() =>
  import('./DownrangeMap.tsx').then(({ DownrangeMap: Drawn }) => ({ default: Drawn })),
);

export interface DownrangeSheetProps {
  studyId: string;
  inputs: StudyInputs;
  address: DownrangeAddress & LimitsAddress;
  locked: string | null;
}

const NO_PLACES: StudySurroundings['places'] = [];
/** Without an orbit the reference parking orbit. */
const PARKING_KM = 185;

function Part({ what, error, again }: { what: string; error: ApiError | undefined; again: () => void }) {
  if (!error) return <p role="status">{`Working out ${what}…`}</p>;
  return (
    <Notice
      fact={`${what[0]?.toUpperCase() ?? ''}${what.slice(1)} could not be worked out.`}
      actions={<Button onClick={again}>Try again</Button>}
      requestId={error.requestId}
    >
      {error.message} The study’s sites, sectors and orbits are as they were.
    </Notice>
  );
}

/** Reads one part of the sheet; what was there stays, marked as being worked out anew, until the new one comes. */
function usePart<Answer>(address: string | null) {
  const { data, error, isValidating, mutate } = useApi<Answer>(address, { revalidateOnFocus: false });
  return { data: error ? undefined : data, error, behind: isValidating, again: () => void mutate() };
}

/** Everything downrange of one site at one azimuth. */
export function DownrangeSheet({ studyId, inputs, address, locked }: DownrangeSheetProps) {
  const results = useMemo(() => computeFlights(inputs), [inputs]);
  const told = useMemo(() => classOfStudyVehicle(inputs), [inputs]);
  const desk = useLaunch(inputs, address, told, (siteId) => flownAzimuths(inputs, results, siteId));
  const { launch } = desk;
  const settled = useSettled(launch);
  const addresses = settled && addressesOf(studyId, settled);
  const corridor = usePart<StudyCorridor>(addresses?.corridor ?? null);
  const fan = usePart<StudyFan>(addresses?.fan ?? null);
  const around = usePart<StudySurroundings>(addresses?.surroundings ?? null);
  const drawn = useDeferredValue(corridor.data);
  useStep((step) => {
    const at = inputs.sites.findIndex(({ code }) => code === launch?.site.code);
    const next = inputs.sites[(at + step + inputs.sites.length) % inputs.sites.length];
    if (next) desk.setSite(next.code);
  });
  const { site, azimuthDeg, densityPerKm2 } = launch ?? {};
  const own = corridor.data?.siteId === site?.siteId ? corridor.data : undefined;
  const [zone, whole] = own?.corridor.features ?? [];
  const heading = !site
    ? 'Downrange'
    : whole
      ? corridorFinding(site, whole.properties)
      : waitingFinding(site, azimuthDeg ?? 0);
  useFinding(heading);
  if (!launch || !site) return null;
  const ownFan = fan.data?.siteId === site.siteId ? fan.data : undefined;
  // The map draws in the browser alone, and stays while another site is worked out.
  const anything = corridor.data !== undefined || around.data !== undefined;
  const ownAround = around.data?.siteId === site.siteId ? around.data : undefined;
  return (
    <>
      <Finding why={zone && <p>{zoneFinding(zone.properties)}</p>}>{heading}</Finding>
      <ScreeningCaution />
      <div className="mt-8">
        <Controls inputs={inputs} launch={launch} desk={desk} told={told} />
      </div>
      <div
        className="downrange-pair mt-10"
        data-stale={corridor.behind ? '' : undefined}
        aria-busy={corridor.behind}
      >
        <div>
          {anything ? (
            <Suspense fallback={<p role="status">Reading the map…</p>}>
              <DownrangeMap
                sites={inputs.sites}
                site={site}
                azimuthDeg={launch.azimuthDeg}
                answer={drawn?.siteId === site.siteId ? drawn : undefined}
                around={ownAround?.places ?? NO_PLACES}
                onSite={desk.setSite}
              />
            </Suspense>
          ) : (
            <p role="status">The map comes with the first figures.</p>
          )}
        </div>
        {own && addresses ? (
          <CorridorFigures answer={own} densityPerKm2={densityPerKm2 ?? 0} file={addresses.file} />
        ) : (
          <Panel title="Corridor">
            <Part what="the corridor" error={corridor.error} again={corridor.again} />
          </Panel>
        )}
      </div>
      <div className="downrange-pair mt-10" data-kind="fan">
        {ownFan ? (
          <>
            <FanPanel fan={ownFan} site={site} azimuthDeg={launch.azimuthDeg} onAzimuth={desk.setAzimuth} />
            <OpenSectors
              key={site.siteId}
              studyId={studyId}
              fan={ownFan}
              site={site}
              parkingKm={inputs.orbits[0]?.parkingKm ?? PARKING_KM}
              address={address}
              locked={locked}
            />
          </>
        ) : (
          <Panel title="Azimuth fan">
            <Part what="the azimuth fan" error={fan.error} again={fan.again} />
          </Panel>
        )}
      </div>
      {own && (
        <div className="mt-10">
          <SettlementsTable answer={own} />
        </div>
      )}
      <div className="mt-10">
        {ownAround ? (
          <Surroundings site={site} answer={ownAround} onSite={desk.setSite} />
        ) : (
          <Panel title="Surroundings">
            <Part what="the surroundings" error={around.error} again={around.again} />
          </Panel>
        )}
      </div>
      <div className="mt-10">
        <DataLimits />
      </div>
    </>
  );
}

import './flown.css';
import { lazy, Suspense, useMemo, useState } from 'react';
import { useAddressParam } from '#components/live/address.ts';
import { useApi } from '#components/live/hooks.ts';
import { Button, ButtonLink, Notice, Panel, Segmented, Select } from '#components/ui/index.ts';
import { formatDateTimeUtc } from '#contract/format.ts';
import type { StudyAscentDetail } from '#contract/study-ascents.ts';
import type { InputOrbit, InputSite, StudyInputs } from '#contract/study-inputs.ts';
import { nameOf } from '../words.ts';
import { AccountTable } from './AccountTable.tsx';
import { eventsOf } from './events.ts';
import { pathOf, placesAt } from './path.ts';
import { limitsOf, momentAt, momentsOf, type Along } from './profile.ts';
import { ProfileCharts } from './ProfileCharts.tsx';
import type { FlownRow } from './results.ts';
import { TimeSlider } from './TimeSlider.tsx';

// The map's library is large: it is asked for when the map is opened, never before.
const FlightMap = lazy(() => import('./FlightMap.tsx').then(({ FlightMap: Map }) => ({ default: Map })));

/** A flight with everything drawn of it; undefined until it is read, or where there is none. */
function useFlight(studyId: string, orbitId: string, row: FlownRow | undefined) {
  const { site, ascent } = row ?? {};
  const flown = site && ascent?.figures?.converged && ascent.hash;
  const address = `/api/v1/studies/${studyId}/ascents/${site?.siteId ?? ''}/${orbitId}`;
  // The hash is of the inputs: another one is another flight, to be read anew.
  const { data, error, mutate } = useApi<StudyAscentDetail>(flown ? `${address}?of=${flown}` : null, {
    revalidateOnFocus: false,
    keepPreviousData: false,
  });
  const flight = useMemo(() => {
    if (!data || !site || !data.figures || data.trajectory.length === 0) return undefined;
    const points = data.trajectory;
    return {
      site,
      ascent: data,
      figures: data.figures,
      points,
      moments: momentsOf(points),
      path: pathOf(points),
    };
  }, [data, site]);
  return { flight, error, again: () => void mutate() };
}
type Flight = NonNullable<ReturnType<typeof useFlight>['flight']>;

const drawn = ({ site, moments }: Flight) => ({ name: site.name, code: site.code, moments });

function Exports({ studyId, flight, orbitId }: { studyId: string; flight: Flight; orbitId: string }) {
  const address = `/api/v1/studies/${studyId}/ascents/${flight.site.siteId}/${orbitId}/trajectory`;
  return (
    <div className="flex flex-wrap gap-2">
      <ButtonLink size="small" icon="export" href={`${address}.csv`}>
        Trajectory as CSV
      </ButtonLink>
      <ButtonLink size="small" icon="export" href={`${address}.geojson`}>
        Trajectory as GeoJSON
      </ButtonLink>
    </div>
  );
}

function WhenFlown({ ascent }: { ascent: StudyAscentDetail }) {
  return (
    <>
      {ascent.flownAt && `Flown ${formatDateTimeUtc(ascent.flownAt)}. `}
      {ascent.figuresAreStale && <b>Inputs changed since; figures of the inputs before. </b>}
    </>
  );
}

interface DrawnFlightProps {
  studyId: string;
  inputs: StudyInputs;
  orbit: InputOrbit;
  flight: Flight;
  other: Flight | undefined;
  onChoose: (code: string) => void;
}

function DrawnFlight({ studyId, inputs, orbit, flight, other, onChoose }: DrawnFlightProps) {
  const [along, setAlong] = useState<Along>('timeS');
  const [wantedS, setTime] = useState(60);
  const [mapOpen, setMapOpen] = useState(false);
  const burnOutS = flight.moments.at(-1)?.timeS ?? 0;
  const timeS = Math.min(wantedS, Math.ceil(burnOutS));
  const events = useMemo(() => eventsOf(flight.points, inputs.vehicle), [flight, inputs.vehicle]);
  const limits = useMemo(() => limitsOf(inputs.vehicle), [inputs.vehicle]);
  const mapped = useMemo(() => [flight, ...(other ? [other] : [])], [flight, other]);
  return (
    <div className="flown-figures">
      <div className="min-w-0">
        <div className="mb-3">
          <Segmented
            legend="Axis that the charts share"
            value={along}
            onChange={setAlong}
            segments={[
              { value: 'timeS', name: 'Against time' },
              { value: 'downrangeKm', name: 'Against downrange' },
            ]}
          />
        </div>
        <ProfileCharts
          flown={drawn(flight)}
          other={other ? drawn(other) : null}
          events={events}
          limits={limits}
          along={along}
          timeS={timeS}
          orbitName={nameOf(orbit)}
        />
        <TimeSlider
          timeS={timeS}
          burnOutS={burnOutS}
          onTime={setTime}
          moment={momentAt(flight.moments, timeS)}
          impact={placesAt(flight.path, timeS).impact}
        />
      </div>
      <div className="min-w-0">
        <AccountTable
          flights={mapped.map(({ site, figures }) => ({ code: site.code, name: site.name, figures }))}
        />
        <p className="caption mt-3">
          <WhenFlown ascent={flight.ascent} />
          Speeds are seen from the turning Earth; the lines above the ideal Δv add up to it.
        </p>
        <div className="mt-4">
          <Exports studyId={studyId} flight={flight} orbitId={orbit.orbitId} />
        </div>
      </div>
      <div className="col-span-full min-w-0">
        {mapOpen ? (
          <>
            <Suspense fallback={<p role="status">Reading the map…</p>}>
              <FlightMap flights={mapped} timeS={timeS} onChoose={onChoose} />
            </Suspense>
            <p className="caption mt-2">
              Line: over the ground. Dashed: where the vehicle would come down if its engines stopped, without
              air or wind. Filled circle: the vehicle at the time chosen; open circle: where it would come
              down then. Map: Natural Earth; place names GeoNames, CC BY 4.0; boundaries as in the data, no
              position taken.
            </p>
          </>
        ) : (
          <Button onClick={() => setMapOpen(true)}>Open the map of this flight</Button>
        )}
      </div>
    </div>
  );
}

interface FlightFiguresProps {
  studyId: string;
  inputs: StudyInputs;
  orbit: InputOrbit;
  rows: readonly FlownRow[];
  chosenCode: string;
  onChoose: (code: string) => void;
}

const rowOf = (rows: readonly FlownRow[], code: string | null): FlownRow | undefined =>
  rows.find(({ site }) => site.code === code);

const choices = (rows: readonly FlownRow[], chosen: InputSite) => [
  { value: '', name: 'no other site' },
  ...rows
    .filter(({ site, ascent }) => site.siteId !== chosen.siteId && ascent?.figures?.converged)
    .map(({ site }) => ({ value: site.code, name: site.name })),
];

/** One site's flight to one orbit: charts over one axis, its account, its map; another site's beside it if wanted. */
export function FlightFigures(props: FlightFiguresProps) {
  const { studyId, inputs, orbit, rows, chosenCode, onChoose } = props;
  // Drawn by script alone, so the address can be read here.
  const [beside, setBeside] = useAddressParam('beside', new URLSearchParams(location.search).get('beside'));
  const row = rowOf(rows, chosenCode);
  const { flight, error, again } = useFlight(studyId, orbit.orbitId, row);
  const besideRow = beside === chosenCode ? undefined : rowOf(rows, beside);
  const other = useFlight(studyId, orbit.orbitId, besideRow);
  if (!row) return null;
  if (!row.ascent?.figures?.converged)
    return (
      <Panel title={`${row.site.name}, ${nameOf(orbit)}: no ascent to draw`}>
        <p className="text-ink-2">Choose a site with a flown payload to see its ascent.</p>
      </Panel>
    );
  return (
    <Panel
      title={`${row.site.name}, ${nameOf(orbit)}: the ascent flown`}
      caption="Dotted: events. Dashed level lines: the limits that the vehicle is flown within."
    >
      <div className="mb-4 w-full phone:w-72">
        <Select
          label="Compare with"
          choices={choices(rows, row.site)}
          value={besideRow?.site.code ?? ''}
          onChange={(event) => setBeside(event.target.value || null)}
        />
      </div>
      {error && (
        <Notice
          fact="The flight could not be read."
          requestId={error.requestId}
          actions={<Button onClick={again}>Try again</Button>}
        >
          {error.message}
        </Notice>
      )}
      {!flight && !error && <p role="status">Reading the flight…</p>}
      {flight && (
        <DrawnFlight
          studyId={studyId}
          inputs={inputs}
          orbit={orbit}
          flight={flight}
          other={other.flight}
          onChoose={onChoose}
        />
      )}
    </Panel>
  );
}

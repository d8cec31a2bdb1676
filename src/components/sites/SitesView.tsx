import './sites.css';
import { lazy, Suspense, useDeferredValue, useMemo, useRef, useState, useSyncExternalStore } from 'react';
import { nameOf } from '#components/flight/words.ts';
import { useAddressParam } from '#components/live/address.ts';
import { useStep } from '#components/live/hooks.ts';
import type { MapLayers, Projection } from '#components/map/types.ts';
import { Button } from '#components/ui/Button.tsx';
import { Notice } from '#components/ui/States.tsx';
import type { SiteList } from '#contract/site.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';
import { AddSite, type AddSiteHandle } from './AddSite.tsx';
import { ChosenSite } from './ChosenSite.tsx';
import { sitesFinding } from './finding.ts';
import { RemoveSites } from './RemoveSites.tsx';
import { nextSort, shownSites, sortOf } from './rows.ts';
import { SiteDetails } from './SiteDetails.tsx';
import { SitesHead } from './SitesHead.tsx';
import { SitesTable } from './SitesTable.tsx';
import { SitesToolbar, VIEWS, type View } from './SitesToolbar.tsx';
import { TableFoot } from './TableFoot.tsx';
import { useEditing } from './use-editing.ts';
import { useFlights } from './use-flights.ts';
import { useInputs } from './use-inputs.ts';
import { useRemoval } from './use-removal.ts';
import { useSites } from './use-sites.ts';

// Asked for as soon as this file runs in a browser, beside the first drawing, not after it.
const readMap = () => import('#components/map/SiteMap.tsx');
const map = typeof window === 'undefined' ? null : readMap();
const SiteMap = lazy(() => (map ?? readMap()).then((module) => ({ default: module.SiteMap })));

/** What the address asks for. */
export interface SitesAddress {
  view: string | null;
  site: string | null;
  orbit: string | null;
  find: string | null;
  sort: string | null;
  globe: string | null;
}

interface SitesViewProps {
  studyId: string;
  /** The first sites, drawn on the server. */
  list: SiteList;
  /** Null where the study is too large to be flown on the server. */
  inputs: StudyInputs | null;
  address: SitesAddress;
  /** Why the inputs can't be changed; null where they can. */
  locked: string | null;
}

const never = () => () => undefined;
/** False on the server and at the first drawing in the browser: the map is drawn by script alone. */
const useInBrowser = (): boolean =>
  useSyncExternalStore(
    never,
    () => true,
    () => false,
  );

/** The Sites section: every candidate on the map and in the table, each saying what the other says. */
export function SitesView({ studyId, list, inputs: initialInputs, address, locked }: SitesViewProps) {
  const store = useSites(studyId, list);
  const inputs = useInputs(studyId, initialInputs);
  const editing = useEditing(store);
  const inBrowser = useInBrowser();

  const [viewParam, setView] = useAddressParam('view', address.view);
  const [siteCode, setSiteCode] = useAddressParam('site', address.site);
  const [orbitCode, setOrbit] = useAddressParam('orbit', address.orbit);
  const [find, setFind] = useAddressParam('find', address.find);
  const [sortParam, setSort] = useAddressParam('sort', address.sort);
  const [globe, setGlobe] = useAddressParam('globe', address.globe);
  const view: View = VIEWS.find((one) => one === viewParam) ?? 'both';
  const projection: Projection = globe === null ? 'flat' : 'globe';

  const [layers, setLayers] = useState<MapLayers>({ sectors: true, track: true, otherTracks: false });
  const [ticked, setTicked] = useState<ReadonlySet<string>>(new Set());
  const removal = useRemoval(store, () => setTicked(new Set()));
  const [placing, setPlacing] = useState(false);
  const [detailsOpen, setDetailsOpen] = useState(false);
  const addSite = useRef<AddSiteHandle>(null);

  const { sites } = store;
  const filter = useDeferredValue(find ?? '');
  const sort = useMemo(() => sortOf(sortParam), [sortParam]);
  const shown = useMemo(() => shownSites(sites, filter, sort), [sites, filter, sort]);
  const tickedSites = useMemo(() => shown.filter(({ id }) => ticked.has(id)), [shown, ticked]);
  const chosen = sites.find(({ code }) => code === siteCode);
  const flights = useFlights({ sites, inputs, orbitCode, chosen, others: layers.otherTracks });
  const finding = useMemo(
    () => sitesFinding(sites, store.total, inputs?.orbits ?? null, flights.results),
    [sites, store.total, inputs, flights.results],
  );
  const chosenTrack = flights.tracks.find(({ siteId }) => siteId === chosen?.id) ?? null;

  const choose = (siteId: string) => setSiteCode(sites.find(({ id }) => id === siteId)?.code ?? null);
  useStep((step) => {
    const here = shown.findIndex(({ id }) => id === chosen?.id);
    const next = shown[(here + step + shown.length) % shown.length] ?? shown[0];
    if (next) setSiteCode(next.code);
  });
  const add = async (draft: Parameters<typeof store.add>[0]) => {
    const made = await store.add(draft);
    setSiteCode(made.code);
    return made;
  };
  const startAdding = () => {
    if (view === 'map') setView(null);
    addSite.current?.focus();
  };

  const mapPart = (
    <div className="sites-map">
      {inBrowser && (
        <Suspense fallback={<p role="status">Reading the map…</p>}>
          <SiteMap
            sites={shown}
            chosenId={chosen?.id ?? null}
            tracks={flights.tracks}
            flownAzimuthDeg={flights.flight?.result.launchAzimuthDeg ?? null}
            layers={layers}
            projection={projection}
            onProjection={(next) => setGlobe(next === 'globe' ? '1' : null)}
            onChoose={choose}
            placing={placing}
            onPlace={([longitudeDeg, latitudeDeg]) => {
              setPlacing(false);
              addSite.current?.take(longitudeDeg, latitudeDeg);
            }}
            onSectors={
              locked === null
                ? async (siteId, sectors) => {
                    const site = sites.find(({ id }) => id === siteId);
                    const permittedAzimuthsDeg = sectors.map(([from, to]): [number, number] => [from, to]);
                    if (site) await editing.write(site, 'permittedAzimuthsDeg', { permittedAzimuthsDeg });
                  }
                : undefined
            }
          />
        </Suspense>
      )}
    </div>
  );

  return (
    <>
      <SitesHead finding={finding} locked={locked} onAdd={startAdding} />
      <SitesToolbar
        studyId={studyId}
        view={view}
        onView={(next) => setView(next === 'both' ? null : next)}
        filter={find ?? ''}
        onFilter={(text) => setFind(text || null)}
        shown={shown.length}
        total={store.total}
        orbits={(inputs?.orbits ?? []).map((orbit) => ({ value: orbit.code, name: nameOf(orbit) }))}
        orbit={flights.orbit?.code ?? ''}
        onOrbit={setOrbit}
        layers={layers}
        onLayers={setLayers}
        ticked={tickedSites.length}
        locked={locked}
        onRemove={() => removal.ask(tickedSites)}
      />
      {(removal.fault ?? store.error) && (
        <Notice
          fact={removal.fault ?? 'The sites could not be read again.'}
          requestId={store.error?.requestId}
          actions={<Button onClick={() => store.reload()}>Read the sites again</Button>}
        >
          What you see is what was read last.
        </Notice>
      )}
      <div className="sites-split" data-view={view}>
        {view !== 'table' && mapPart}
        <div className="sites-side">
          {view !== 'map' && (
            <>
              <SitesTable
                sites={shown}
                chosenId={chosen?.id ?? null}
                onChoose={choose}
                ticked={ticked}
                onTick={setTicked}
                sort={sort}
                onSort={(key) => setSort(nextSort(sort, key))}
                editing={editing}
                locked={locked}
              />
              {store.loading && <p role="status">{`Reading ${store.total} sites…`}</p>}
              <TableFoot total={store.total} shown={shown.length} onShowAll={() => setFind(null)} />
            </>
          )}
          {chosen && (
            <ChosenSite
              site={chosen}
              flight={flights.flight}
              track={chosenTrack}
              onOpen={() => setDetailsOpen(true)}
            />
          )}
          <AddSite
            ref={addSite}
            sites={sites}
            locked={locked}
            placing={placing}
            onPlacing={(next) => {
              if (next && view === 'table') setView(null);
              setPlacing(next);
            }}
            onAdd={add}
          />
        </div>
      </div>
      <RemoveSites sites={removal.asked} onClose={removal.leave} onRemove={removal.remove} />
      {detailsOpen && chosen && (
        <SiteDetails
          studyId={studyId}
          site={chosen}
          locked={locked}
          onClose={() => setDetailsOpen(false)}
          onSave={store.change}
          onKeep={(site) => {
            store.show(site);
            setDetailsOpen(false);
          }}
        />
      )}
    </>
  );
}

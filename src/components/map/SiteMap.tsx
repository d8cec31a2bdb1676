import 'maplibre-gl/dist/maplibre-gl.css';
import './map.css';
import { useEffect, useMemo, useRef, useState } from 'react';
import { Button } from '#components/ui/Button.tsx';
import { Segmented } from '#components/ui/Segmented.tsx';
import { Notice } from '#components/ui/States.tsx';
import { canDraw } from './library.ts';
import { Locator } from './Locator.tsx';
import { MapView } from './map-view.ts';
import { PadButtons } from './PadButtons.tsx';
import { SectorHandles } from './SectorHandles.tsx';
import type { LngLat, MapScene, Projection, SectorDeg } from './types.ts';

export interface SiteMapProps extends Omit<MapScene, 'draft'> {
  projection: Projection;
  onProjection: (projection: Projection) => void;
  onChoose: (siteId: string) => void;
  /** A click adds a place instead of choosing a pad. */
  placing: boolean;
  onPlace: (place: LngLat) => void;
  /** Saves the chosen pad's sectors; left out where they may not be changed. */
  onSectors?: ((siteId: string, sectors: readonly SectorDeg[]) => Promise<void>) | undefined;
  /** Hands out the drawn map, for a section that adds layers of its own; null when it goes. */
  onView?: ((view: MapView | null) => void) | undefined;
}

const projections = [
  { value: 'flat', name: 'Flat' },
  { value: 'globe', name: 'Globe' },
] as const;

/** The map, or a plain word where the browser can't draw one; the table beside it says the same. */
export function SiteMap(props: SiteMapProps) {
  const [drawable] = useState(canDraw);
  if (drawable) return <DrawnMap {...props} />;
  return (
    <Notice fact="The map cannot be drawn here">
      This browser has no WebGL 2. The table holds everything the map would show; sites are added and changed
      there.
    </Notice>
  );
}

function useMapView(props: SiteMapProps, scene: MapScene) {
  const holder = useRef<HTMLDivElement>(null);
  const canvas = useRef<HTMLCanvasElement>(null);
  const [view, setView] = useState<MapView | null>(null);
  const [fault, setFault] = useState<string | null>(null);
  const chosenHere = useRef<string | null>(null);
  const latest = useRef(props);
  useEffect(() => {
    latest.current = props;
  });

  useEffect(() => {
    if (!holder.current || !canvas.current) return;
    const made = new MapView(
      { container: holder.current, canvas: canvas.current, projection: latest.current.projection },
      { ...latest.current, draft: null },
      {
        onChoose: (siteId) => {
          chosenHere.current = siteId;
          latest.current.onChoose(siteId);
        },
        onPlace: (place) => latest.current.onPlace(place),
        onFault: setFault,
      },
    );
    setView(made);
    latest.current.onView?.(made);
    return () => {
      latest.current.onView?.(null);
      made.remove();
    };
  }, []);

  useEffect(() => view?.setScene(scene), [view, scene]);
  useEffect(() => view?.setProjection(props.projection), [view, props.projection]);
  useEffect(() => view?.setPlacing(props.placing), [view, props.placing]);
  useEffect(() => {
    const { sites, flights } = latest.current;
    const chosen = sites.find(({ id }) => id === props.chosenId);
    // A flight is shown whole, below.
    if (chosen && !flights && chosenHere.current !== props.chosenId) view?.flyTo(chosen);
    chosenHere.current = null;
  }, [view, props.chosenId]);
  useEffect(() => {
    const [first] = latest.current.sites;
    if (!view || !props.flights) return;
    // A sphere has no frame that a long flight would fit: it is turned to the pad.
    if (props.projection === 'globe' && first) view.flyTo(first);
    else view.fitAll(false);
  }, [view, props.flights, props.projection]);
  return { holder, canvas, view, fault };
}

function DrawnMap(props: SiteMapProps) {
  const { sites, chosenId, tracks, flownAzimuthDeg, layers, flights, moment, onSectors } = props;
  const [draft, setDraft] = useState<readonly SectorDeg[] | null>(null);
  const scene = useMemo(
    () => ({ sites, chosenId, tracks, flownAzimuthDeg, layers, flights, moment, draft }),
    [sites, chosenId, tracks, flownAzimuthDeg, layers, flights, moment, draft],
  );
  const { holder, canvas, view, fault } = useMapView(props, scene);
  const chosen = sites.find(({ id }) => id === chosenId);

  // Keys settle after a pause, by a callback of an earlier drawing: the newest draft is kept apart from it.
  const newest = useRef<readonly SectorDeg[] | null>(null);
  const move = (sectors: readonly SectorDeg[]) => {
    newest.current = sectors;
    setDraft(sectors);
  };
  const settle = () => {
    const settled = newest.current;
    if (!settled || !chosen || !onSectors) return;
    newest.current = null;
    const clear = () => setDraft((now) => (now === settled ? null : now));
    void onSectors(chosen.id, settled).then(clear, clear);
  };
  return (
    <div className="map-sheet">
      <div className="map-holder" ref={holder} />
      <canvas className="map-overlay" ref={canvas} aria-hidden="true" />
      {view && (
        <div className="map-inner">
          <PadButtons view={view} sites={sites} chosenId={chosenId} onChoose={props.onChoose} />
          {chosen && layers.sectors && (
            <SectorHandles
              view={view}
              site={chosen}
              sectors={draft ?? chosen.permittedAzimuthsDeg}
              onMove={onSectors && move}
              onSettle={settle}
            />
          )}
          <MapControls view={view} projection={props.projection} onProjection={props.onProjection} />
          {props.placing && <PlacingHint view={view} />}
          <Locator view={view} sites={sites} chosen={chosen} />
        </div>
      )}
      {fault && (
        <p className="map-fault" role="status">
          Part of the map could not be read ({fault}). The table is complete.
        </p>
      )}
    </div>
  );
}

function PlacingHint({ view }: { view: MapView }) {
  return (
    <div className="map-placing">
      <span>Click the place of the new site.</span>
      <Button size="small" onClick={() => view.placeAtCentre()}>
        Take the middle of the map
      </Button>
    </div>
  );
}

function MapControls({
  view,
  projection,
  onProjection,
}: { view: MapView } & Pick<SiteMapProps, 'projection' | 'onProjection'>) {
  return (
    <div className="map-controls">
      <Segmented legend="Projection" segments={projections} value={projection} onChange={onProjection} />
      <div className="map-zoom">
        <button type="button" onClick={() => view.map.zoomIn()} aria-label="Zoom in" title="Zoom in (+)">
          +
        </button>
        <button type="button" onClick={() => view.map.zoomOut()} aria-label="Zoom out" title="Zoom out (−)">
          −
        </button>
      </div>
      <Button size="small" onClick={() => view.fitAll()}>
        All pads
      </Button>
    </div>
  );
}

import { Map, type GeoJSONSource, type LngLatLike, type MapMouseEvent } from 'maplibre-gl';
import { boundsOf } from './bounds.ts';
import {
  flightFeatures,
  momentFeatures,
  onTiles,
  padFeatures,
  tickFeatures,
  trackFeatures,
} from './features.ts';
import { imageScale, imagesOf } from './images.ts';
import { prepareLibrary } from './library.ts';
import { drawOverlay, innerOf, padsInView } from './overlay.ts';
import { padFrame, type PadFrame } from './pad-frame.ts';
import { onThemeChange, readPalette } from './palette.ts';
import { layersOf, styleOf } from './style.ts';
import type { LngLat, MapFlight, MapScene, MapSite, Projection } from './types.ts';

interface Hooks {
  readonly onChoose: (siteId: string) => void;
  readonly onPlace: (place: LngLat) => void;
  readonly onFault: (message: string) => void;
}

type PaintProperty = Parameters<Map['setPaintProperty']>[1];

const REACH_PX = 10;
const CLOSEST = 12;

/** Decimals of a clicked place: as many as a pixel is worth. */
const placeDecimals = (zoom: number): number => Math.max(1, Math.min(5, Math.round(zoom / 3.3) + 1));

/** One drawn map: the library's canvas with the overlay above it. React hands it scenes; it hands back choices. */
export class MapView {
  readonly map: Map;
  readonly #canvas: HTMLCanvasElement;
  readonly #hooks: Hooks;
  readonly #frameListeners = new Set<() => void>();
  readonly #stopTheme: () => void;
  #scene: MapScene;
  #projection: Projection;
  #palette = readPalette();
  #placing = false;
  #ready = false;

  constructor(
    {
      container,
      canvas,
      projection,
    }: { container: HTMLElement; canvas: HTMLCanvasElement; projection: Projection },
    scene: MapScene,
    hooks: Hooks,
  ) {
    prepareLibrary();
    this.#canvas = canvas;
    this.#hooks = hooks;
    this.#scene = scene;
    this.#projection = projection;
    this.map = new Map({
      container,
      style: styleOf(this.#palette, projection),
      center: [0, 15],
      zoom: 0.6,
      maxZoom: CLOSEST,
      attributionControl: false,
      dragRotate: false,
      pitchWithRotate: false,
      touchPitch: false,
      rollEnabled: false,
      fadeDuration: 0,
      locale: { 'Map.Title': 'Map of the candidate sites' },
    });
    this.map.touchZoomRotate.disableRotation();
    this.map.keyboard.disableRotation();
    this.fitAll(false);
    this.map.on('style.load', () => this.#load());
    this.map.on('move', () => this.redraw());
    this.map.on('resize', () => this.redraw());
    this.map.on('click', (event) => this.#click(event));
    this.map.on('mousemove', (event) => this.#point(event));
    this.map.on('error', ({ error }) => hooks.onFault(error.message));
    this.#stopTheme = onThemeChange(() => this.#repaint());
    // Figures on the overlay are set in Plex; the first drawing may come before it has arrived.
    void document.fonts.ready.then(() => this.redraw());
  }

  get projection(): Projection {
    return this.#projection;
  }

  remove(): void {
    this.#stopTheme();
    this.#frameListeners.clear();
    this.map.remove();
  }

  /** Calls back whenever the view or the scene moves. @returns how to stop */
  onFrame(listener: () => void): () => void {
    this.#frameListeners.add(listener);
    return () => this.#frameListeners.delete(listener);
  }

  setScene(scene: MapScene): void {
    const before = this.#scene;
    this.#scene = scene;
    if (this.#ready) this.#feed(before);
    this.redraw();
  }

  setProjection(projection: Projection): void {
    if (projection === this.#projection) return;
    this.#projection = projection;
    this.map.setProjection({ type: projection === 'globe' ? 'globe' : 'mercator' });
    this.redraw();
  }

  setPlacing(placing: boolean): void {
    this.#placing = placing;
    this.map.getCanvas().style.cursor = placing ? 'crosshair' : '';
  }

  /** The middle of the view, as a place to add a site at without a mouse. */
  placeAtCentre(): void {
    if (this.#placing) this.#place(this.map.getCenter());
  }

  frameOf(site: MapSite): PadFrame | undefined {
    return padFrame(this.map, site, this.#projection === 'globe');
  }

  isInView(site: MapSite): boolean {
    const frame = this.frameOf(site);
    const { width, height } = innerOf(this.#canvas);
    return frame !== undefined && frame.x > 0 && frame.y > 0 && frame.x < width && frame.y < height;
  }

  padsInView(): { site: MapSite; frame: PadFrame }[] {
    const state = { scene: this.#scene, palette: this.#palette, projection: this.#projection };
    return padsInView(this.map, state, innerOf(this.#canvas));
  }

  flyTo({ longitudeDeg, latitudeDeg }: MapSite): void {
    // On the globe the library's zoom counts a map that grows towards the poles; the sphere doesn't.
    const growth = (latitude: number): number =>
      this.#projection === 'globe' ? Math.log2(Math.max(0.09, Math.cos((latitude * Math.PI) / 180))) : 0;
    const now = this.map.getZoom() - growth(this.map.getCenter().lat);
    const zoom = Math.max(now, 2.8) + growth(latitudeDeg);
    this.map.easeTo({ center: [longitudeDeg, latitudeDeg], zoom, duration: moveTime() });
  }

  fitAll(animate = true): void {
    const box = boundsOf([...this.#scene.sites, ...placesOf(this.#scene.flights ?? [])]);
    if (!box) return;
    const corners: [LngLatLike, LngLatLike] = [
      [box.west, Math.max(-80, box.south)],
      [box.east, Math.min(80, box.north)],
    ];
    const { clientWidth, clientHeight } = this.map.getContainer();
    const side = Math.min(70, clientWidth / 8);
    // The scale and the locator stand at the foot.
    const padding = { top: side, left: side, right: side, bottom: Math.min(120, clientHeight / 4) };
    this.map.fitBounds(corners, { padding, maxZoom: 5, animate, duration: moveTime() });
  }

  redraw(): void {
    const state = { scene: this.#scene, palette: this.#palette, projection: this.#projection };
    drawOverlay(this.#canvas, this.map, state);
    for (const listener of this.#frameListeners) listener();
  }

  #load(): void {
    this.#ready = true;
    for (const [name, image] of Object.entries(imagesOf(this.#palette)))
      this.map.addImage(name, image, { pixelRatio: imageScale });
    this.#feed(undefined);
    this.redraw();
  }

  #source(name: string): GeoJSONSource | undefined {
    return this.map.getSource<GeoJSONSource>(name);
  }

  #feed(before: MapScene | undefined): void {
    const { sites, chosenId, tracks, layers } = this.#scene;
    const chosen = sites.filter(({ id }) => id === chosenId);
    const chosenMoved = before?.chosenId !== chosenId;
    this.#feedFlights(before, chosenMoved);
    if (before?.sites !== sites) void this.#source('pads')?.setData(padFeatures(sites));
    if (before?.sites !== sites || chosenMoved) {
      void this.#source('chosen')?.setData(padFeatures(chosen));
      this.map.setFilter('pad', ['!=', ['get', 'id'], chosenId ?? '']);
    }
    if (before?.tracks === tracks && before.layers === layers && !chosenMoved) return;
    const shown = tracks.filter(({ siteId }) => (siteId === chosenId ? layers.track : layers.otherTracks));
    void this.#source('tracks')?.setData(trackFeatures(shown, chosenId));
    void this.#source('ticks')?.setData(tickFeatures(shown, chosenId));
  }

  #feedFlights(before: MapScene | undefined, chosenMoved: boolean): void {
    const { flights, moment, chosenId } = this.#scene;
    if (before?.flights !== flights || chosenMoved)
      void this.#source('flights')?.setData(flightFeatures(flights ?? [], chosenId));
    if (before?.moment !== moment) void this.#source('moment')?.setData(momentFeatures(moment));
  }

  #repaint(): void {
    this.#palette = readPalette();
    for (const [name, image] of Object.entries(imagesOf(this.#palette)))
      if (this.map.hasImage(name)) this.map.updateImage(name, image);
    for (const layer of layersOf(this.#palette))
      for (const [property, value] of Object.entries(layer.paint ?? {}))
        this.map.setPaintProperty(layer.id, property as PaintProperty, value);
    this.redraw();
  }

  #padAt({ x, y }: { x: number; y: number }): string | undefined {
    if (!this.#ready) return undefined;
    const box: [[number, number], [number, number]] = [
      [x - REACH_PX, y - REACH_PX],
      [x + REACH_PX, y + REACH_PX],
    ];
    const [found] = this.map.queryRenderedFeatures(box, { layers: ['chosen-pad', 'pad'] });
    if (found) return String(found.properties['id']);
    const polar = this.padsInView().filter(({ site }) => !onTiles(site));
    return polar.find(({ frame }) => Math.hypot(frame.x - x, frame.y - y) < REACH_PX)?.site.id;
  }

  #click(event: MapMouseEvent): void {
    if (this.#placing) {
      this.#place(event.lngLat);
      return;
    }
    const id = this.#padAt(event.point);
    if (id) this.#hooks.onChoose(id);
  }

  #place(at: { lng: number; lat: number }): void {
    const decimals = placeDecimals(this.map.getZoom());
    const turned = at.lng - 360 * Math.ceil((at.lng - 180) / 360);
    this.#hooks.onPlace([Number(turned.toFixed(decimals)), Number(at.lat.toFixed(decimals))]);
  }

  #point(event: MapMouseEvent): void {
    if (!this.#placing) this.map.getCanvas().style.cursor = this.#padAt(event.point) ? 'pointer' : '';
  }
}

/** Places of flights, each longitude brought within half a turn of zero. */
const placesOf = (flights: readonly MapFlight[]) =>
  flights.flatMap(({ ground, impacts }) =>
    [...ground, ...impacts].map(([longitude, latitudeDeg]) => ({
      longitudeDeg: longitude - 360 * Math.round(longitude / 360),
      latitudeDeg,
    })),
  );

/** --time-move in ms: nothing when motion is reduced. */
function moveTime(): number {
  const time = getComputedStyle(document.documentElement).getPropertyValue('--time-move').trim();
  return Number.parseFloat(time) * (time.endsWith('ms') ? 1 : 1000) || 0;
}

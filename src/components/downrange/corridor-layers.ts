import type { FeatureCollection, Feature, LineString, Point, Polygon, Position } from 'geojson';
import type { GeoJSONSource, LayerSpecification, Map } from 'maplibre-gl';
import { onThemeChange } from '#components/map/palette.ts';
import type { NearPlace, StudyCorridor } from '#contract/downrange.ts';

type Zone = StudyCorridor['corridor']['features'][number];

const collect = <F extends Feature>(features: F[]): FeatureCollection => ({
  type: 'FeatureCollection',
  features,
});
const polygonsOf = ({ geometry }: Zone): number[][][][] =>
  geometry.type === 'Polygon' ? [geometry.coordinates] : geometry.coordinates;

/** Where the cut at the date line or a pole runs, there is no edge of the corridor. */
const isCut = (a: Position, b: Position): boolean =>
  (Math.abs(a[0] ?? 0) >= 180 - 1e-6 && Math.abs(b[0] ?? 0) >= 180 - 1e-6) ||
  (Math.abs(a[1] ?? 0) >= 90 - 1e-6 && Math.abs(b[1] ?? 0) >= 90 - 1e-6);

/** A ring's edge in runs, the sides of the cut left out. */
export function edgesOf(ring: readonly Position[]): Position[][] {
  const runs: Position[][] = [];
  ring.slice(1).forEach((to, at) => {
    const from = ring[at] as Position;
    if (isCut(from, to)) return;
    const last = runs.at(-1);
    if (last && last.at(-1) === from) last.push(to);
    else runs.push([from, to]);
  });
  return runs;
}

/** Exclusion zone and corridor as fills. */
export const fillsOf = (answer: StudyCorridor | undefined): FeatureCollection =>
  collect(
    (answer?.corridor.features ?? []).flatMap((zone) =>
      polygonsOf(zone).map((coordinates): Feature<Polygon> => ({
        type: 'Feature',
        properties: { kind: zone.properties.kind },
        geometry: { type: 'Polygon', coordinates },
      })),
    ),
  );

export const outlinesOf = (answer: StudyCorridor | undefined): FeatureCollection =>
  collect(
    (answer?.corridor.features ?? []).flatMap((zone) =>
      polygonsOf(zone)
        .flat()
        .flatMap(edgesOf)
        .map((coordinates): Feature<LineString> => ({
          type: 'Feature',
          properties: { kind: zone.properties.kind },
          geometry: { type: 'LineString', coordinates },
        })),
    ),
  );

interface Dot {
  readonly name: string;
  readonly people: number;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
}

const keyOf = ({ name, latitudeDeg, longitudeDeg }: Dot): string => `${name}/${latitudeDeg}/${longitudeDeg}`;

/** Settlements as circles: those inside the corridor, and those about the site that lie outside. */
export function dotsOf(answer: StudyCorridor | undefined, around: readonly NearPlace[]): FeatureCollection {
  const inside = answer?.settlements ?? [];
  const known = new Set(inside.map(keyOf));
  const dot = (place: Dot, isInside: boolean): Feature<Point> => ({
    type: 'Feature',
    properties: {
      name: place.name,
      people: place.people,
      inside: isInside,
      // Area by people.
      radius: Math.min(14, Math.max(1.6, Math.sqrt(place.people / 20_000) * 1.6)),
    },
    geometry: { type: 'Point', coordinates: [place.longitudeDeg, place.latitudeDeg] },
  });
  const outside = around.filter((place) => !known.has(keyOf(place)));
  return collect([...outside.map((place) => dot(place, false)), ...inside.map((place) => dot(place, true))]);
}

const HATCH = 'corridor-hatch';
const SIDE = 8;
const RATIO = 2;

const token = (name: string): string =>
  getComputedStyle(document.documentElement).getPropertyValue(name).trim();

/** 45° ink lines over the corridor's tint. */
function hatch(): ImageData {
  const canvas = document.createElement('canvas');
  canvas.width = canvas.height = SIDE * RATIO;
  const pen = canvas.getContext('2d', { willReadFrequently: true });
  if (!pen) throw new Error('a canvas gave no pen');
  pen.scale(RATIO, RATIO);
  pen.fillStyle = token('--map-corridor');
  pen.fillRect(0, 0, SIDE, SIDE);
  pen.strokeStyle = token('--ink-3');
  pen.lineWidth = 0.9;
  pen.beginPath();
  for (const shift of [-SIDE, 0, SIDE]) {
    pen.moveTo(shift - 1, SIDE + 1);
    pen.lineTo(shift + SIDE + 1, -1);
  }
  pen.stroke();
  return pen.getImageData(0, 0, SIDE * RATIO, SIDE * RATIO);
}

function layers(): LayerSpecification[] {
  const [ink, sea, settlement, label] = ['--ink', '--map-sea', '--map-settlement', '--map-label'].map(
    token,
  ) as [string, string, string, string];
  return [
    {
      id: 'corridor-fill',
      type: 'fill',
      source: 'corridor-fills',
      filter: ['==', ['get', 'kind'], 'corridor'],
      paint: { 'fill-pattern': HATCH },
    },
    {
      id: 'corridor-zone',
      type: 'fill',
      source: 'corridor-fills',
      filter: ['==', ['get', 'kind'], 'exclusion-zone'],
      paint: { 'fill-color': ink, 'fill-opacity': 0.28 },
    },
    {
      id: 'corridor-edge',
      type: 'line',
      source: 'corridor-edges',
      paint: { 'line-color': ink, 'line-width': ['match', ['get', 'kind'], 'corridor', 1, 1.6] },
    },
    {
      id: 'corridor-dot',
      type: 'circle',
      source: 'corridor-dots',
      paint: {
        // Far out the circles shrink, so that a crowded coast does not become one blot.
        'circle-radius': [
          'interpolate',
          ['linear'],
          ['zoom'],
          1.5,
          ['*', 0.3, ['get', 'radius']],
          6,
          ['get', 'radius'],
        ],
        'circle-color': ['case', ['get', 'inside'], settlement, sea],
        'circle-opacity': ['case', ['get', 'inside'], 0.85, 0.4],
        'circle-stroke-color': settlement,
        'circle-stroke-width': 1,
      },
    },
    {
      id: 'corridor-name',
      type: 'symbol',
      source: 'corridor-dots',
      filter: ['>=', ['get', 'people'], 100_000],
      layout: {
        'text-field': ['get', 'name'],
        'text-font': ['Plex Sans'],
        'text-size': 11,
        'text-variable-anchor': ['left', 'right', 'top', 'bottom'],
        'text-radial-offset': 1,
        'symbol-sort-key': ['-', ['get', 'people']],
      },
      paint: { 'text-color': label, 'text-halo-color': sea, 'text-halo-width': 1.5 },
    },
  ];
}

const SOURCES = ['corridor-fills', 'corridor-edges', 'corridor-dots'] as const;
type Data = Readonly<Record<(typeof SOURCES)[number], FeatureCollection>>;
type PaintProperty = Parameters<Map['setPaintProperty']>[1];

/** The corridor's layers on a map, under its pads. @returns how to show new data, and how to leave off */
export function addCorridor(map: Map): { show: (data: Data) => void; stop: () => void } {
  let newest: Data | undefined;
  const feed = () => {
    if (!newest) return;
    for (const name of SOURCES) void map.getSource<GeoJSONSource>(name)?.setData(newest[name]);
  };
  const add = () => {
    if (map.getSource(SOURCES[0])) return;
    map.addImage(HATCH, hatch(), { pixelRatio: RATIO });
    for (const name of SOURCES)
      map.addSource(name, { type: 'geojson', data: { type: 'FeatureCollection', features: [] } });
    for (const layer of layers()) map.addLayer(layer, 'pad');
    feed();
  };
  if (map.isStyleLoaded()) add();
  else map.once('style.load', add);
  const stop = onThemeChange(() => {
    if (!map.hasImage(HATCH)) return;
    map.updateImage(HATCH, hatch());
    for (const { id, paint = {} } of layers())
      for (const [property, value] of Object.entries(paint))
        map.setPaintProperty(id, property as PaintProperty, value);
  });
  return {
    show: (data) => {
      newest = data;
      feed();
    },
    stop,
  };
}

import { createRequire } from 'node:module';
import { geoGraticule, geoPath, geoProjection, type GeoProjection } from 'd3-geo';
import { feature } from 'topojson-client';
import type { GeometryCollection, Topology } from 'topojson-specification';
import type { MemoMap, MemoPad } from '#contract/memo.ts';
import { placeLabels, type Box } from './labels.ts';
import { mapView, type MapView } from './map-view.ts';

export type MapDrawing = Pick<
  MemoMap,
  'width' | 'height' | 'land' | 'graticule' | 'degrees' | 'pads' | 'others'
>;

interface Place {
  latitudeDeg: number;
  longitudeDeg: number;
}

export interface MapSite extends Place {
  code: string;
  mark: MemoPad['mark'];
}

/** Room for the degrees at the left and under the frame, and sizes of letters and pads, in points. */
const LEFT = 26;
const UNDER = 11;
const SIZES = { character: 4.2, ascent: 5.4, descent: 1.6, pad: 3.6 };

const require = createRequire(import.meta.url);
type Land = Topology<{ land: GeometryCollection }>;

function land(view: MapView): ReturnType<typeof feature> {
  const file = view.lonSpanDeg < 70 ? 'world-atlas/land-50m.json' : 'world-atlas/land-110m.json';
  const topology = require(file) as Land;
  return feature(topology, topology.objects.land);
}

/** Equidistant cylindrical about the view's middle: true along its middle parallel and along every meridian. */
function projectionOf(view: MapView, frame: Box): GeoProjection {
  const cos = Math.cos((view.trueLatDeg * Math.PI) / 180);
  return geoProjection((lambda, phi) => [lambda * cos, phi])
    .rotate([-view.midLonDeg, 0])
    .scale((view.pointsPerDeg * 180) / Math.PI)
    .translate([
      (frame.left + frame.right) / 2,
      (frame.top + frame.bottom) / 2 + view.midLatDeg * view.pointsPerDeg,
    ])
    .clipExtent([
      [frame.left, frame.top],
      [frame.right, frame.bottom],
    ])
    .precision(0.1);
}

const hemisphere = (deg: number, positive: string, negative: string): string =>
  deg === 0 || Math.abs(deg) === 180
    ? `${Math.abs(deg)}°`
    : `${Math.abs(deg)}° ${deg > 0 ? positive : negative}`;

function degreesOf(view: MapView, frame: Box): MemoMap['degrees'] {
  const cos = Math.cos((view.trueLatDeg * Math.PI) / 180);
  const bottom = view.meridiansDeg.map((lon) => ({
    x: (frame.left + frame.right) / 2 + (lon - view.midLonDeg) * view.pointsPerDeg * cos,
    y: frame.bottom + UNDER - 2,
    text: hemisphere(((lon + 540) % 360) - 180, 'E', 'W'),
    side: 'bottom' as const,
  }));
  const left = view.parallelsDeg.map((lat) => ({
    x: LEFT - 3,
    y: (frame.top + frame.bottom) / 2 - (lat - view.midLatDeg) * view.pointsPerDeg + 2.3,
    text: hemisphere(lat, 'N', 'S'),
    side: 'left' as const,
  }));
  return [...left, ...bottom.filter(({ x }) => x > frame.left + 8 && x < frame.right - 8)];
}

const dotAt = ({ x, y }: { x: number; y: number }): string => `M${x - 0.8} ${y - 0.8}h1.6v1.6h-1.6Z`;

/**
 * Draws the candidates on the coast, cut to where they lie. Letters keep their size: for a narrow place draw a narrow map.
 * @param sites in the order in which labels are placed: the leader first.
 * @param others drawn as dots, without a name.
 * @param width of the figure, points.
 * @returns everything a renderer needs but number, caption and notes.
 */
export function drawMap(sites: readonly MapSite[], others: readonly Place[], width: number): MapDrawing {
  const view = mapView([...sites, ...others], width - LEFT);
  const frame: Box = { left: LEFT, top: 0, right: width, bottom: view.height };
  const projection = projectionOf(view, frame);
  const path = geoPath(projection).digits(1);
  const step = view.stepDeg;
  const graticule = geoGraticule()
    .step([step, step])
    .extentMajor([
      [-180, -90],
      [180, 90.01],
    ]);
  const at = ({ longitudeDeg, latitudeDeg }: Place) => {
    const [x = 0, y = 0] = projection([longitudeDeg, latitudeDeg]) ?? [];
    return { x: Math.round(x * 100) / 100, y: Math.round(y * 100) / 100 };
  };
  const places = sites.map((site) => ({ ...at(site), text: site.code, mark: site.mark }));
  const labels = placeLabels(places, places, frame, SIZES);
  return {
    width,
    height: view.height + UNDER,
    land: path(land(view)) ?? '',
    graticule: path(graticule()) ?? '',
    degrees: degreesOf(view, frame),
    pads: places.map(({ x, y, mark }, index): MemoPad => {
      const placed = labels[index];
      const label = placed ? { x: placed.x, y: placed.y, text: placed.text } : null;
      return { x, y, mark, label, leader: placed?.leader ?? null };
    }),
    others: others.map((place) => dotAt(at(place))).join(''),
  };
}

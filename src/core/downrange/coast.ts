import { CELL_DEG, COLUMNS, ROWS, UNITS_PER_DEG, cornerOf } from './data/cells.ts';
import { between } from './geodesic.ts';
import type { Place } from './geodesic.ts';
import { SEA } from './land-map.ts';
import type { LandMap } from './land-map.ts';
import { MEAN_RADIUS, directionOf, dot } from './strip.ts';
import type { Vector } from './strip.ts';

/** The nearest point of the coastline. */
export interface NearestCoast {
  readonly place: Place;
  /** m. */
  readonly distance: number;
}

interface Found {
  readonly side: Side;
  readonly share: number;
  readonly distance: number;
}

/** A side of a ring, in units. */
type Side = readonly [x0: number, y0: number, x1: number, y1: number];

const RADIAN = Math.PI / 180;

/** Points tried on a side: atlas sides are some 1 km long, only borders and far shores longer. */
const SHARES = [0, 0.25, 0.5, 0.75, 1];

const placeAt = ([x0, y0, x1, y1]: Side, share: number): Place => ({
  longitudeDeg: (x0 + share * (x1 - x0)) / UNITS_PER_DEG,
  latitudeDeg: (y0 + share * (y1 - y0)) / UNITS_PER_DEG,
});

function* sidesIn(map: LandMap, cell: number): Generator<Side> {
  for (const { rings, whole } of map.pieces(cell))
    if (!whole)
      for (const ring of rings)
        for (let at = 0; at < ring.length; at += 2) {
          const next = (at + 2) % ring.length;
          yield [ring[at], ring[at + 1], ring[next], ring[next + 1]] as unknown as Side;
        }
}

/** Whether one side of a ring's side is land and the other sea: neither a border nor a seam between cells. */
function isCoast(map: LandMap, side: Side): boolean {
  const [x0, y0, x1, y1] = side;
  const { latitudeDeg, longitudeDeg } = placeAt(side, 0.5);
  const length = Math.hypot(x1 - x0, y1 - y0);
  if (length === 0 || Math.abs(latitudeDeg) > 89.9) return false;
  const aside = 0.3 / UNITS_PER_DEG / length;
  const [dx, dy] = [-(y1 - y0) * aside, (x1 - x0) * aside];
  const wrap = (degrees: number): number =>
    degrees > 180 ? degrees - 360 : degrees < -180 ? degrees + 360 : degrees;
  const countries = [1, -1].map((sign) =>
    map.countryAt({ latitudeDeg: latitudeDeg + sign * dy, longitudeDeg: wrap(longitudeDeg + sign * dx) }),
  );
  return countries.filter((country) => country === SEA).length === 1;
}

/** No place of a cell lies nearer than this, m: by its latitudes, and by the meridian at its near side. */
function leastDistance(from: Place, cell: number): number {
  const [west, south] = cornerOf(cell).map((units) => units / UNITS_PER_DEG) as [number, number];
  const nearest = Math.max(south, Math.min(south + CELL_DEG, from.latitudeDeg));
  const off = Math.abs(from.latitudeDeg - nearest) * RADIAN;
  const middle = west + CELL_DEG / 2;
  const turn = Math.abs(((from.longitudeDeg - middle + 540) % 360) - 180) - CELL_DEG / 2;
  const aside = Math.sin(Math.max(0, Math.min(90, turn)) * RADIAN);
  const across = Math.asin(Math.min(1, Math.cos(from.latitudeDeg * RADIAN) * aside));
  // A hundredth less, for the sphere is not the ellipsoid.
  return 0.99 * MEAN_RADIUS * Math.max(off, across);
}

function nearestIn(map: LandMap, cell: number, up: Vector, farthest: number): Found | null {
  let best = null as Found | null;
  for (const side of sidesIn(map, cell))
    for (const share of SHARES) {
      const distance = MEAN_RADIUS * Math.acos(Math.min(1, dot(up, directionOf(placeAt(side, share)))));
      if (distance < (best?.distance ?? farthest) && isCoast(map, side)) best = { side, share, distance };
    }
  return best;
}

/** Every cell with land, those that can be nearest first. */
function cellsByDistance(map: LandMap, from: Place): { cell: number; least: number }[] {
  return Array.from({ length: ROWS * COLUMNS }, (_, cell) => cell)
    .filter((cell) => map.pieces(cell).length > 0)
    .map((cell) => ({ cell, least: leastDistance(from, cell) }))
    .sort((a, b) => a.least - b.least || a.cell - b.cell);
}

/**
 * The nearest point of the coast of any land, as the atlas draws it; lakes have none.
 * @returns null only where the map holds no coast at all
 * @see tests/core/downrange/surroundings.test.ts
 */
export function nearestCoast(map: LandMap, from: Place): NearestCoast | null {
  const up = directionOf(from);
  let best = null as Found | null;
  for (const { cell, least } of cellsByDistance(map, from)) {
    if (best && least > best.distance) break;
    best = nearestIn(map, cell, up, best?.distance ?? Infinity) ?? best;
  }
  if (!best) return null;
  const place = placeAt(best.side, best.share);
  return { place, distance: between(from, place).distance };
}

/** Whether a place lies on land, by the atlas. */
export const isOnLand = (map: LandMap, place: Place): boolean => map.countryAt(place) !== SEA;

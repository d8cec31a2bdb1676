import type { Metres } from '../units.ts';
import { between } from './geodesic.ts';
import type { Place } from './geodesic.ts';
import type { Outline } from './outline.ts';
import { polarError, polarPoint, radiusBetween } from './polar.ts';
import { halfWidthAt, inCorridor, inExclusionZone, shapeOf } from './shape.ts';
import type { Shape } from './shape.ts';
import { MEAN_RADIUS, ROUGH_ERROR, Strip, directionOf, dot } from './strip.ts';
import type { StripPoint, Vector } from './strip.ts';
import type { VehicleClass } from './vehicle-class.ts';

/** A flight corridor of the published geometry, placed on the ellipsoid. */
export interface Corridor {
  readonly start: Place;
  /** Of the flight line at the launch point, clockwise from north. */
  readonly azimuthDeg: number;
  readonly vehicleClass: VehicleClass;
  readonly shape: Shape;
  readonly strip: Strip;
}

/** A GeoJSON position: longitude, latitude. */
export type Position = [longitudeDeg: number, latitudeDeg: number];

/**
 * The corridor of a class from a launch point along an azimuth.
 * @param azimuthDeg clockwise from north
 * @param range how far downrange; at most 5,000 nautical miles
 * @throws RangeError for a place that is none, an azimuth that is no figure, or a range that shapeOf refuses
 * @see downrangeReferences.appendixA, tests/reference/corridor.csv
 */
export function corridorOf(
  start: Place,
  azimuthDeg: number,
  vehicleClass: VehicleClass,
  range: Metres,
): Corridor {
  const { latitudeDeg, longitudeDeg } = start;
  if (!(Math.abs(latitudeDeg) <= 90) || !Number.isFinite(longitudeDeg) || !Number.isFinite(azimuthDeg))
    throw new RangeError(`corridorOf: from ${latitudeDeg}°, ${longitudeDeg}° at ${azimuthDeg}°`);
  const shape = shapeOf(vehicleClass, range);
  return { start, azimuthDeg, vehicleClass, shape, strip: new Strip(start, azimuthDeg) };
}

/** An outline of the corridor as places, in its order; the first place is not repeated. */
export function placed({ strip }: Corridor, outline: Outline): Position[] {
  return outline.map(([s, y]) => {
    const { longitudeDeg, latitudeDeg } = strip.path.beside(s, y);
    return [longitudeDeg, latitudeDeg];
  });
}

/** Whether the sphere's strip coordinates settle the question; undefined where the ellipsoid has to be asked. */
function roughly({ shape }: Corridor, { s, y }: StripPoint, doubt: number): boolean | undefined {
  const across = Math.abs(y);
  const tangent = shape.corners[0]?.[0] ?? 0;
  if (s < -shape.circleRadius - doubt || s > shape.range + doubt) return false;
  const widest = halfWidthAt(shape, Math.min(shape.range, Math.max(0, s + doubt)));
  if (across > widest + doubt) return false;
  const surely = s - doubt > tangent && s + doubt < shape.range;
  return surely && across < halfWidthAt(shape, s - doubt) - doubt ? true : undefined;
}

/**
 * Whether distance and azimuth from the launch point settle the question: they cost less than a foot on the ellipsoid,
 * and err by little. Not near the launch point or the corridor's end, where more than the side is in question.
 */
function byPolar(
  { shape, start, azimuthDeg, strip }: Corridor,
  place: Place,
  direction: Vector,
): boolean | undefined {
  const sight = between(start, place);
  const radius = radiusBetween(strip.up, direction);
  const doubt = polarError(sight.distance);
  const { s, y } = polarPoint(sight.distance, ((sight.azimuthDeg - azimuthDeg) * Math.PI) / 180, radius);
  if (s < NEAR || s > shape.range - 2 * doubt) return undefined;
  const clearance = halfWidthAt(shape, s) - Math.abs(y);
  return Math.abs(clearance) > doubt ? clearance > 0 : undefined;
}

/** Nearer than this a foot is sought at once. */
const NEAR = 200_000;

/**
 * Whether a place lies in the corridor: decided on a sphere where that is safe, else by distance and azimuth on the
 * ellipsoid, and close to the corridor's edge by the foot on its flight line.
 * @param direction of the place from the Earth's centre, where it is known already
 */
export function containsPlace(
  corridor: Corridor,
  place: Place,
  direction: Vector = directionOf(place),
): boolean {
  const { shape, strip } = corridor;
  const point = strip.rough(direction);
  const away = Math.acos(Math.max(-1, Math.min(1, dot(direction, strip.up)))) * MEAN_RADIUS;
  const known = roughly(corridor, point, ROUGH_ERROR * away + 1) ?? byPolar(corridor, place, direction);
  if (known !== undefined) return known;
  const { s, y } = strip.exact(place);
  return inCorridor(shape, s, y);
}

/** Whether a place lies in the overflight exclusion zone. */
export function isExcluded(
  corridor: Corridor,
  place: Place,
  direction: Vector = directionOf(place),
): boolean {
  const { circleRadius, exclusionLength } = corridor.shape;
  const point = corridor.strip.rough(direction);
  const reach = (circleRadius + exclusionLength) * 1.01;
  if (Math.abs(point.s) > reach || Math.abs(point.y) > reach) return false;
  const { s, y } = corridor.strip.exact(place);
  return inExclusionZone(corridor.shape, s, y);
}

import { constants } from '../constants.ts';
import { ECCENTRICITY_SQUARED as e2 } from '../flight/earth.ts';
import { halfWidthAt } from './shape.ts';
import type { Shape } from './shape.ts';
import { MEAN_RADIUS } from './strip.ts';
import type { Vector } from './strip.ts';

/**
 * Strip coordinates from distance and azimuth on the ellipsoid, by the right triangle on a sphere of the given radius.
 * @param turn from the flight line to the place's azimuth, rad
 */
export function polarPoint(
  distance: number,
  turn: number,
  radius: number,
): { readonly s: number; readonly y: number } {
  const arc = distance / radius;
  return {
    s: radius * Math.atan2(Math.sin(arc) * Math.cos(turn), Math.cos(arc)),
    y: radius * Math.asin(Math.sin(arc) * Math.sin(turn)),
  };
}

/** Gauss's mean radius of curvature, a √(1 − e²)/(1 − e² sin²φ), halfway between two directions. */
export function radiusBetween(from: Vector, to: Vector): number {
  const [x, y, z] = [from[0] + to[0], from[1] + to[1], from[2] + to[2]];
  const sinSquared = (z * z) / (x * x + y * y + z * z);
  return (constants.equatorialRadius.value * Math.sqrt(1 - e2)) / (1 - e2 * sinSquared);
}

/**
 * How far off the clearance by a polar point may be, m, with the radius halfway: it grows with the square of the
 * distance (tests/core/downrange/strip.test.ts holds it to this).
 */
export const polarError = (distance: number): number => 0.35e-10 * distance * distance + 1;

/** How far inside the corridor's side a place lies, m; negative outside it. */
export function clearance(shape: Shape, distance: number, turn: number, radius: number): number {
  const { s, y } = polarPoint(distance, turn, radius);
  return halfWidthAt(shape, s) - Math.abs(y);
}

/** The farthest that any place of the corridor lies from its launch point, m. */
export function reachOf(shape: Shape): number {
  const half = halfWidthAt(shape, shape.range);
  return MEAN_RADIUS * Math.acos(Math.cos(shape.range / MEAN_RADIUS) * Math.cos(half / MEAN_RADIUS));
}

/** Narrowest and widest turn at which the corridor holds a place, rad. */
export interface TurnSpan {
  readonly low: number;
  readonly high: number;
}

/** Beyond the range a place lies inside only so far to the side that its foot is at the corridor's end. */
function turnAtEnd(range: number, distance: number): number {
  return Math.acos(Math.min(1, Math.tan(range / MEAN_RADIUS) / Math.tan(distance / MEAN_RADIUS)));
}

/**
 * The turns away from a place's azimuth at which the corridor holds it, on the mean sphere; null where it never does.
 * The corridor is seen whole from its launch point, so that the turns are one span on each side.
 */
export function turnsInside(shape: Shape, distance: number): TurnSpan | null {
  if (distance <= shape.circleRadius) return { low: 0, high: Math.PI };
  const low = distance <= shape.range ? 0 : turnAtEnd(shape.range, distance);
  if (clearance(shape, distance, low + 1e-12, MEAN_RADIUS) < 0) return null;
  let [inside, outside] = [low, Math.PI];
  for (let step = 0; step < 40; step += 1) {
    const middle = (inside + outside) / 2;
    if (clearance(shape, distance, middle, MEAN_RADIUS) >= 0) inside = middle;
    else outside = middle;
  }
  return { low, high: inside };
}

const ENTRIES = 1000;

/** The widest turn at a distance between the circle and the range, read from a table: within 0.2°. */
export function widestTurns(shape: Shape): (distance: number) => number {
  const length = shape.range - shape.circleRadius;
  const table = Float64Array.from({ length: ENTRIES + 2 }, (_, at) => {
    const distance = shape.circleRadius + length * Math.min(1, at / ENTRIES) ** 2;
    return turnsInside(shape, distance)?.high ?? 0;
  });
  return (distance) => {
    const place = ENTRIES * Math.sqrt((distance - shape.circleRadius) / length);
    const entry = Math.floor(place);
    const [low, high] = [table[entry] as number, table[entry + 1] as number];
    return low + (place - entry) * (high - low);
  };
}

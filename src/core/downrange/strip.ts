import { ConvergenceError } from '../convergence-error.ts';
import { ECCENTRICITY_SQUARED } from '../flight/earth.ts';
import { GeodesicPath, between } from './geodesic.ts';
import type { Place } from './geodesic.ts';

/** Where a place lies from a flight line: s along it from the launch point, y square to it, positive to the right. */
export interface StripPoint {
  readonly s: number;
  readonly y: number;
}

/** Mean radius of the ellipsoid, (2a + b)/3: the sphere that foots are first sought on. */
export const MEAN_RADIUS = 6_371_008.7714;
const RADIAN = Math.PI / 180;
const CLOSE_ENOUGH = 1e-4;
const MOST_STEPS = 30;

export type Vector = readonly [number, number, number];

/** The direction of a place from the Earth's centre, taken at its geocentric latitude. */
export function directionOf({ latitudeDeg, longitudeDeg }: Place): Vector {
  const geocentric = Math.atan((1 - ECCENTRICITY_SQUARED) * Math.tan(latitudeDeg * RADIAN));
  const cos = Math.cos(geocentric);
  const longitude = longitudeDeg * RADIAN;
  return [cos * Math.cos(longitude), cos * Math.sin(longitude), Math.sin(geocentric)];
}

export const dot = (a: Vector, b: Vector): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

/**
 * How far the sphere's answer may lie from the ellipsoid's, as a share of the distance from the launch point
 * (tests/core/downrange/strip.test.ts holds it to half of this).
 */
export const ROUGH_ERROR = 0.0045;

/** A flight line with what it takes to say where places lie from it. */
export class Strip {
  readonly path: GeodesicPath;
  /** Direction of the launch point. */
  readonly up: Vector;
  readonly #ahead: Vector;
  readonly #right: Vector;

  constructor(start: Place, azimuthDeg: number) {
    this.path = new GeodesicPath(start, azimuthDeg);
    const up = directionOf(start);
    const [sinLon, cosLon] = [Math.sin(start.longitudeDeg * RADIAN), Math.cos(start.longitudeDeg * RADIAN)];
    const east: Vector = [-sinLon, cosLon, 0];
    const north: Vector = [-up[2] * cosLon, -up[2] * sinLon, up[0] * cosLon + up[1] * sinLon];
    const [sin, cos] = [Math.sin(azimuthDeg * RADIAN), Math.cos(azimuthDeg * RADIAN)];
    this.up = up;
    this.#ahead = [north[0] * cos + east[0] * sin, north[1] * cos + east[1] * sin, north[2] * cos];
    this.#right = [east[0] * cos - north[0] * sin, east[1] * cos - north[1] * sin, -north[2] * sin];
  }

  /** On a sphere: within ROUGH_ERROR of the distance flown to the place. */
  rough(direction: Vector): StripPoint {
    const ahead = dot(direction, this.#ahead);
    return {
      s: MEAN_RADIUS * Math.atan2(ahead, dot(direction, this.up)),
      y: MEAN_RADIUS * Math.asin(Math.max(-1, Math.min(1, dot(direction, this.#right)))),
    };
  }

  /**
   * On the ellipsoid, to 0.1 mm: the foot is moved along the flight line by what a right triangle on the sphere says
   * of the geodesic from it to the place, until that geodesic stands square.
   * @throws ConvergenceError where no foot is found, as it may be beyond a quarter of the way round the Earth
   */
  exact(place: Place): StripPoint {
    let { s } = this.rough(directionOf(place));
    let step = Infinity;
    for (let count = 0; count < MOST_STEPS; count += 1) {
      const foot = this.path.at(s);
      const { distance, azimuthDeg } = between(foot, place);
      const off = (azimuthDeg - foot.azimuthDeg) * RADIAN;
      const arc = distance / MEAN_RADIUS;
      step = MEAN_RADIUS * Math.atan2(Math.sin(arc) * Math.cos(off), Math.cos(arc));
      if (Math.abs(step) < CLOSE_ENOUGH) return { s, y: Math.sin(off) < 0 ? -distance : distance };
      s += step;
    }
    throw new ConvergenceError('strip foot', MOST_STEPS, step);
  }
}

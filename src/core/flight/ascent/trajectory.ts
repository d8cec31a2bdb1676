import { impactPoint } from '../impact/impact-point.ts';
import type { ImpactPoint } from '../impact/impact-point.ts';
import { MASS } from './flyer.ts';
import type { Flyer } from './flyer.ts';
import { geodeticOf } from './planet.ts';

/** Figures of a point: time, inertial state, mass, dynamic pressure, acceleration felt. */
const STRIDE = 10;

/** One moment of a flight, as it is seen from the turning Earth. SI, angles in rad. */
export interface TrajectoryPoint {
  readonly time: number;
  /** Geodetic, north positive. */
  readonly latitude: number;
  /** East of the launch site's meridian, −π…π. */
  readonly longitude: number;
  /** Above the ellipsoid. */
  readonly altitude: number;
  readonly relativeSpeed: number;
  /** Of the air-relative velocity, above the ellipsoid's horizontal. */
  readonly flightPath: number;
  /** Of the air-relative velocity, clockwise from north, 0…2π. */
  readonly heading: number;
  readonly mass: number;
  readonly dynamicPressure: number;
  /** What those aboard feel: thrust and drag over mass. */
  readonly acceleration: number;
}

/** A flight written down as it was flown: a flat row of figures, read point by point. */
export class Trajectory {
  private readonly figures: number[] = [];

  get length(): number {
    return this.figures.length / STRIDE;
  }

  /** Writes down where a flyer is; it has to be accounting. */
  note(flyer: Flyer): void {
    flyer.probe();
    const { state } = flyer;
    this.figures.push(flyer.time);
    for (let k = 0; k <= MASS; k++) this.figures.push(state[k] as number);
    this.figures.push(flyer.dynamicPressure, flyer.felt);
  }

  private figure(point: number, place: number): number {
    return this.figures[point * STRIDE + place] as number;
  }

  /** A point; longitudes count from the launch site. */
  point(index: number, planet: Flyer['planet']): TrajectoryPoint {
    const [time, x, y, z, vx, vy, vz] = Array.from({ length: 7 }, (_, k) => this.figure(index, k)) as [
      number,
      number,
      number,
      number,
      number,
      number,
      number,
    ];
    const omega = planet.rotationRate;
    const p = Math.hypot(x, y);
    const { latitude, height } = geodeticOf(planet, p, z);
    const [wx, wy] = [vx + omega * y, vy - omega * x];
    const w = Math.hypot(wx, wy, vz);
    const [east, outward] = p > 0 ? [(x * wy - y * wx) / p, (x * wx + y * wy) / p] : [wy, wx];
    const [sin, cos] = [Math.sin(latitude), Math.cos(latitude)];
    const north = vz * cos - outward * sin;
    const up = vz * sin + outward * cos;
    const turned = Math.atan2(y, x) - omega * time;
    const heading = Math.atan2(east, north);
    return {
      time,
      latitude,
      longitude: turned - 2 * Math.PI * Math.round(turned / (2 * Math.PI)),
      altitude: height,
      relativeSpeed: w,
      flightPath: w > 0 ? Math.asin(Math.min(1, Math.max(-1, up / w))) : Math.PI / 2,
      heading: heading < 0 ? heading + 2 * Math.PI : heading,
      mass: this.figure(index, 7),
      dynamicPressure: this.figure(index, 8),
      acceleration: this.figure(index, 9),
    };
  }

  /** Where the vehicle would come down from a point; its longitude counts from the launch site. */
  impact(index: number, planet: Flyer['planet']): ImpactPoint {
    const state = Array.from({ length: 6 }, (_, k) => this.figure(index, k + 1));
    const found = impactPoint(state, planet);
    if (found.kind !== 'impact') return found;
    const turned = found.longitude - planet.rotationRate * this.figure(index, 0);
    const longitude = (turned - 2 * Math.PI * Math.round(turned / (2 * Math.PI))) as typeof found.longitude;
    return { ...found, longitude };
  }

  /** The greatest dynamic pressure, at the top of the parabola through the greatest point and its neighbours. */
  greatestPressure(): number {
    let top = 0;
    for (let k = 1; k < this.length; k++) if (this.figure(k, 8) > this.figure(top, 8)) top = k;
    const most = this.figure(top, 8);
    if (top === 0 || top === this.length - 1) return most;
    const [a, b] = [
      this.figure(top, 0) - this.figure(top - 1, 0),
      this.figure(top + 1, 0) - this.figure(top, 0),
    ];
    // Two points at one moment: something was dropped, and the parabola has no width.
    if (!(a > 0) || !(b > 0)) return most;
    const [before, after] = [(most - this.figure(top - 1, 8)) / a, (this.figure(top + 1, 8) - most) / b];
    const curvature = (after - before) / (a + b);
    const slope = (before * b + after * a) / (a + b);
    return curvature < 0 ? most - (slope * slope) / (4 * curvature) : most;
  }

  /** The greatest acceleration felt, of the points. */
  greatestAcceleration(): number {
    let most = 0;
    for (let k = 0; k < this.length; k++) most = Math.max(most, this.figure(k, 9));
    return most;
  }
}

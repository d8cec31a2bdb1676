import { radians, seconds } from '../../units.ts';
import type { Radians, Seconds } from '../../units.ts';
import { EARTH } from '../ascent/planet.ts';
import type { Planet } from '../ascent/planet.ts';
import { rootBetween } from '../brent.ts';
import { leastOver } from '../minimum.ts';

/**
 * Where a state would come down if thrust ended: on the ellipsoid after some time, nowhere because it stays in orbit or
 * escapes, or nowhere because it lies below the surface already.
 */
export type ImpactPoint =
  | {
      readonly kind: 'impact';
      /** Geodetic, north positive. */
      readonly latitude: Radians;
      /** East of the meridian that the x axis lies in now, −π…π. */
      readonly longitude: Radians;
      readonly time: Seconds;
    }
  | { readonly kind: 'orbit' }
  | { readonly kind: 'escape' }
  | { readonly kind: 'none' };

/** Steps in which one turn of the conic is looked over for the surface. */
const STEPS = 96;
/** An energy this near to zero, over μ/r, is taken for a slow escape. */
const PARABOLIC = 1e-10;

/** A Keplerian arc from a state, told by the difference of eccentric (or hyperbolic) anomaly from there. */
class Arc {
  readonly bound: boolean;
  /** e cos E and e sin E at the start, or their hyperbolic like. */
  readonly alongApse: number;
  readonly acrossApse: number;
  /** 1/n: seconds per radian of mean anomaly. */
  private readonly pace: number;
  private readonly semiAxis: number;
  private readonly r: number;
  private x = 0;
  private y = 0;
  z = 0;

  constructor(
    private readonly planet: Planet,
    private readonly state: ArrayLike<number>,
  ) {
    const [x, y, z, vx, vy, vz] = state as unknown as [number, number, number, number, number, number];
    const mu = planet.gravitationalParameter;
    this.r = Math.hypot(x, y, z);
    // r/A = 2 − r v²/μ.
    let reach = 2 - (this.r * (vx * vx + vy * vy + vz * vz)) / mu;
    if (Math.abs(reach) < PARABOLIC) reach = -PARABOLIC;
    this.bound = reach > 0;
    this.semiAxis = this.r / reach;
    const size = Math.abs(this.semiAxis);
    this.pace = Math.sqrt((size * size * size) / mu);
    this.alongApse = 1 - reach;
    this.acrossApse = (x * vx + y * vy + z * vz) / Math.sqrt(mu * size);
  }

  /** Seconds to a difference of anomaly, by Kepler's equation. */
  time(anomaly: number): number {
    const { alongApse, acrossApse, pace } = this;
    return this.bound
      ? pace * (anomaly - alongApse * Math.sin(anomaly) + acrossApse * (1 - Math.cos(anomaly)))
      : pace * (alongApse * Math.sinh(anomaly) + acrossApse * (Math.cosh(anomaly) - 1) - anomaly);
  }

  private go(anomaly: number): void {
    const { state, pace, bound } = this;
    const cosine = bound ? Math.cos(anomaly) : Math.cosh(anomaly);
    const lag = bound ? anomaly - Math.sin(anomaly) : Math.sinh(anomaly) - anomaly;
    const f = 1 - (this.semiAxis / this.r) * (1 - cosine);
    const g = this.time(anomaly) - pace * lag;
    this.x = f * (state[0] as number) + g * (state[3] as number);
    this.y = f * (state[1] as number) + g * (state[4] as number);
    this.z = f * (state[2] as number) + g * (state[5] as number);
  }

  /** (x² + y²)/a² + z²/b² − 1: above zero outside the ellipsoid. */
  readonly outside = (anomaly: number): number => {
    this.go(anomaly);
    const { equatorialRadius: a, eccentricitySquared: e2 } = this.planet;
    return (this.x * this.x + this.y * this.y + (this.z * this.z) / (1 - e2)) / (a * a) - 1;
  };

  place(anomaly: number): Extract<ImpactPoint, { kind: 'impact' }> {
    this.go(anomaly);
    const time = this.time(anomaly);
    const east = Math.atan2(this.y, this.x) - this.planet.rotationRate * time;
    return {
      kind: 'impact',
      latitude: radians(
        Math.atan2(this.z, (1 - this.planet.eccentricitySquared) * Math.hypot(this.x, this.y)),
      ),
      longitude: radians(east - 2 * Math.PI * Math.round(east / (2 * Math.PI))),
      time: seconds(time),
    };
  }

  /** Anomaly to where the conic is farthest (bound) or nearest (unbound), and how far it is worth looking. */
  span(): { readonly apse: number; readonly end: number } {
    if (this.bound) {
      const apogee = Math.PI - Math.atan2(this.acrossApse, this.alongApse);
      return { apse: apogee > 2 * Math.PI ? apogee - 2 * Math.PI : apogee, end: 2 * Math.PI };
    }
    const perigee = -Math.atanh(this.acrossApse / this.alongApse);
    return { apse: perigee, end: Math.max(2 * perigee, 0) };
  }
}

/** The first anomaly at which an arc passes from outside the ellipsoid to inside; undefined where it never does. */
function firstCrossing(arc: Arc): number | undefined {
  const { apse, end } = arc.span();
  if (end === 0) return undefined;
  const step = end / STEPS;
  const between = (low: number, high: number, atLow: number, atHigh: number) =>
    rootBetween(arc.outside, low, high, atLow, atHigh, 1e-14);
  let [low, atLow] = [0, arc.outside(0)];
  let [lowest, atLowest] = [0, Infinity];
  for (let k = 1; k <= STEPS; k++) {
    // A hop shorter than a step is seen from its top.
    const stops = apse > low && apse < k * step ? [apse, k * step] : [k * step];
    for (const next of stops) {
      const atNext = arc.outside(next);
      if (atNext < 0) return between(low, next, Math.max(atLow, 0), atNext);
      if (atNext < atLowest) [lowest, atLowest] = [next, atNext];
      [low, atLow] = [next, atNext];
    }
  }
  // A graze may dip below the surface between two looks.
  const from = Math.max(lowest - step, 0);
  const dip = leastOver(arc.outside, from, Math.min(lowest + step, end), 4, 1e-9);
  return dip.value < 0 ? between(from, dip.at, Math.max(arc.outside(from), 0), dip.value) : undefined;
}

/**
 * The instantaneous impact point: the Keplerian arc from a state to the ellipsoid's surface, with the Earth turning
 * beneath it; no air, no J₂.
 * @param state inertial x, y, z in m and their rates in m/s; z along the Earth's axis
 * @see ascentReferences.impactPoint, tests/reference/impact-point.csv
 */
export function impactPoint(state: ArrayLike<number>, planet: Planet = EARTH): ImpactPoint {
  const arc = new Arc(planet, state);
  // A float's worth below the surface is on it.
  if (arc.outside(0) < -1e-12) return { kind: 'none' };
  const crossing = firstCrossing(arc);
  if (crossing !== undefined) return arc.place(crossing);
  return { kind: arc.bound ? 'orbit' : 'escape' };
}

import { constants } from '../constants.ts';
import { metresPerSecond, radians, seconds } from '../units.ts';
import type { Metres, MetresPerSecond, Radians, Seconds } from '../units.ts';

const MU = constants.gravitationalParameter.value;
const A = constants.equatorialRadius.value;
const J2 = constants.secondZonalHarmonic.value;
const NODE_RATE_OF_THE_SUN = (2 * Math.PI) / constants.tropicalYear.value;

/** Radius of an altitude. Altitudes of orbits count from the equatorial radius: r = a + h. */
export const radiusOf = (altitude: Metres): number => A + altitude;

/**
 * Speed on a conic by vis-viva, v = √(μ(2/r − 1/a)).
 * @param radius distance from the Earth's centre, in metres
 * @param semiMajorAxis of the conic, in metres
 * @see references.visViva, tests/reference/orbit.csv
 */
export function speedAt(radius: number, semiMajorAxis: number): MetresPerSecond {
  return metresPerSecond(Math.sqrt(MU * (2 / radius - 1 / semiMajorAxis)));
}

/** Speed on a circle, v = √(μ/r). @see references.visViva, tests/reference/orbit.csv */
export function circularSpeed(radius: number): MetresPerSecond {
  return metresPerSecond(Math.sqrt(MU / radius));
}

/** Period of a conic, T = 2π √(a³/μ). @see references.visViva, tests/reference/orbit.csv */
export function periodOf(semiMajorAxis: number): Seconds {
  return seconds(2 * Math.PI * Math.sqrt(semiMajorAxis ** 3 / MU));
}

/** Size and shape of an orbit between two altitudes over the equatorial radius. */
export interface Shape {
  readonly perigeeRadius: number;
  readonly apogeeRadius: number;
  readonly semiMajorAxis: number;
  /** p = a(1 − e²), in metres. */
  readonly semiLatusRectum: number;
}

/** @throws RangeError where the perigee lies above the apogee */
export function shapeOf(perigeeAltitude: Metres, apogeeAltitude: Metres): Shape {
  if (!(perigeeAltitude <= apogeeAltitude)) {
    throw new RangeError(`shapeOf: perigee ${perigeeAltitude} m above apogee ${apogeeAltitude} m`);
  }
  const perigeeRadius = radiusOf(perigeeAltitude);
  const apogeeRadius = radiusOf(apogeeAltitude);
  const semiMajorAxis = (perigeeRadius + apogeeRadius) / 2;
  return {
    perigeeRadius,
    apogeeRadius,
    semiMajorAxis,
    semiLatusRectum: (perigeeRadius * apogeeRadius) / semiMajorAxis,
  };
}

/** J₂ rate of the node for cos i = 1 with the sign turned, (3/2) J₂ n (a/p)², in rad/s. */
function nodeRateScale({ semiMajorAxis, semiLatusRectum }: Shape): number {
  const meanMotion = Math.sqrt(MU / semiMajorAxis ** 3);
  return 1.5 * J2 * meanMotion * (A / semiLatusRectum) ** 2;
}

/** Secular rate of the ascending node from J₂ in rad/s, eastward positive. @see references.secularNode */
export function nodeRate(perigeeAltitude: Metres, apogeeAltitude: Metres, inclination: Radians): number {
  return -nodeRateScale(shapeOf(perigeeAltitude, apogeeAltitude)) * Math.cos(inclination);
}

/** The inclination at which an orbit keeps its place to the mean Sun, or that there is none. */
export type SunSynchronous =
  { readonly kind: 'found'; readonly inclination: Radians } | { readonly kind: 'none' };

/**
 * Inclination at which the J₂ rate of the node is one turn a tropical year:
 * −(3/2) J₂ n (a/p)² cos i = 2π/T, first order, mean motion unperturbed.
 * @returns `found` with an inclination between 90° and 180°, or `none` where the orbit is too large
 * @see references.secularNode, tests/reference/sun-synchronous.csv
 */
export function sunSynchronousInclination(perigeeAltitude: Metres, apogeeAltitude: Metres): SunSynchronous {
  const cosInclination = -NODE_RATE_OF_THE_SUN / nodeRateScale(shapeOf(perigeeAltitude, apogeeAltitude));
  if (cosInclination < -1) return { kind: 'none' };
  return { kind: 'found', inclination: radians(Math.acos(cosInclination)) };
}

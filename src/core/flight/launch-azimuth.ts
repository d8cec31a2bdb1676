import { metresPerSecond, radians } from '../units.ts';
import type { MetresPerSecond, Radians } from '../units.ts';
import { wrap } from './azimuths.ts';

/** Slack of reach: relative and absolute, on cosines. */
const RELATIVE = 1e-14;
const ABSOLUTE = 1e-15;

/**
 * How a latitude meets an inclination: `none` where no azimuth reaches it, `one` where due east or west alone does,
 * `two` where a northerly and a southerly azimuth do.
 */
export type Reach = 'none' | 'one' | 'two';

/**
 * Whether |cos i| ≤ cos φ′, with slack; the cosines are compared before any ratio is formed.
 * @param cosLatitude cos φ′ of the geocentric latitude, ≥ 0
 * @param cosInclination cos i, exactly 0 for a polar orbit
 */
export function reachOf(cosLatitude: number, cosInclination: number): Reach {
  const needed = Math.abs(cosInclination);
  if (needed > cosLatitude * (1 + RELATIVE) + ABSOLUTE) return 'none';
  // At a pole a polar orbit is flown along any meridian: north and south stand for them.
  if (cosLatitude <= ABSOLUTE) return 'two';
  return needed >= cosLatitude * (1 - RELATIVE) - ABSOLUTE ? 'one' : 'two';
}

/** sin β = cos i / cos φ′, clamped, for an inclination that is reached. */
export function sinInertialAzimuth(cosLatitude: number, cosInclination: number): number {
  if (cosLatitude <= ABSOLUTE) return 0;
  const ratio = cosInclination / cosLatitude;
  return ratio > 1 ? 1 : ratio < -1 ? -1 : ratio;
}

/**
 * The inertial azimuths that reach an inclination, sin β = cos i / cos φ′.
 * @param geocentricLatitude φ′, −π/2…π/2
 * @param inclination 0…π
 * @returns none, one (exactly π/2 or 3π/2) or two (northerly, then southerly), clockwise from north
 * @see references.launchAzimuth, tests/reference/azimuth.csv
 */
export function inertialAzimuths(geocentricLatitude: Radians, inclination: Radians): readonly Radians[] {
  const cosLatitude = Math.cos(geocentricLatitude);
  const cosInclination = Math.cos(inclination);
  const reach = reachOf(cosLatitude, cosInclination);
  if (reach === 'none') return [];
  if (reach === 'one') return [radians(cosInclination > 0 ? Math.PI / 2 : 1.5 * Math.PI)];
  const northerly = Math.asin(sinInertialAzimuth(cosLatitude, cosInclination));
  return [wrap(northerly), wrap(Math.PI - northerly)];
}

/** The launch seen from the turning Earth. */
export interface LaunchVector {
  readonly launchAzimuth: Radians;
  readonly requiredSpeed: MetresPerSecond;
}

/**
 * The launch azimuth and the speed required over the turning Earth:
 * east v_i sin β − v_e, north v_i cos β.
 * @param inertialAzimuth β, clockwise from north
 * @param injectionSpeed v_i, inertial
 * @param rotationSpeed v_e of the site, due east
 * @see references.launchAzimuth, tests/reference/azimuth.csv
 */
export function launchVector(
  inertialAzimuth: Radians,
  injectionSpeed: MetresPerSecond,
  rotationSpeed: MetresPerSecond,
): LaunchVector {
  const east = injectionSpeed * Math.sin(inertialAzimuth) - rotationSpeed;
  const north = injectionSpeed * Math.cos(inertialAzimuth);
  return {
    launchAzimuth: wrap(Math.atan2(east, north)),
    requiredSpeed: metresPerSecond(Math.hypot(east, north)),
  };
}

/** Inclination of the plane flown at an azimuth, cos i = cos φ′ sin β, 0…π. */
export function inclinationFlown(geocentricLatitude: Radians, inertialAzimuth: Radians): Radians {
  const sinLatitude = Math.sin(geocentricLatitude);
  const cosLatitude = Math.cos(geocentricLatitude);
  const across = cosLatitude * Math.cos(inertialAzimuth);
  return radians(Math.atan2(Math.hypot(sinLatitude, across), cosLatitude * Math.sin(inertialAzimuth)));
}

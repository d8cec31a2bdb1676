import { constants } from '../../constants.ts';
import type { Metres, MetresPerSecond, Radians } from '../../units.ts';
import { meridianOf } from '../earth.ts';

/** A state as it is seen from the turning Earth. */
export interface GroundState {
  /** Geodetic, north positive. */
  readonly latitude: Radians;
  /** East positive. */
  readonly longitude: Radians;
  /** Above the ellipsoid. */
  readonly altitude: Metres;
  readonly relativeSpeed: MetresPerSecond;
  /** Above the local horizontal, −π/2…π/2. */
  readonly flightPath: Radians;
  /** Clockwise from north. */
  readonly heading: Radians;
}

/**
 * The inertial state at a moment when the frame's x axis lies in the meridian of longitude 0: v = v_rel + ω × r.
 * @returns x, y, z in m and their rates in m/s
 * @see references.wgs84, tests/reference/impact-point.csv
 */
export function inertialState(ground: GroundState): Float64Array {
  const { latitude, longitude, altitude, relativeSpeed, flightPath, heading } = ground;
  const { axisDistance, z } = meridianOf(latitude, altitude);
  const [sinLatitude, cosLatitude] = [Math.sin(latitude), Math.cos(latitude)];
  const [s, c] = [Math.sin(longitude), Math.cos(longitude)];
  const up = relativeSpeed * Math.sin(flightPath);
  const level = relativeSpeed * Math.cos(flightPath);
  const east = level * Math.sin(heading) + constants.rotationRate.value * axisDistance;
  const north = level * Math.cos(heading);
  const outward = up * cosLatitude - north * sinLatitude;
  return Float64Array.of(
    axisDistance * c,
    axisDistance * s,
    z,
    outward * c - east * s,
    outward * s + east * c,
    up * sinLatitude + north * cosLatitude,
  );
}

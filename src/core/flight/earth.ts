import { constants } from '../constants.ts';
import { metres, metresPerSecond, radians } from '../units.ts';
import type { Metres, MetresPerSecond, Radians } from '../units.ts';

const A = constants.equatorialRadius.value;
const F = 1 / constants.inverseFlattening.value;
/** First eccentricity squared, e² = f(2 − f). */
export const ECCENTRICITY_SQUARED = F * (2 - F);
/** Polar radius b = a(1 − f). */
export const POLAR_RADIUS = metres(A * (1 - F));

/** cos, exactly 0 at ±π/2, so that a pole has no distance from the axis. */
export function exactCos(angle: number): number {
  const cosine = Math.cos(angle);
  return Math.abs(cosine) < 1e-16 ? 0 : cosine;
}

/** Where a site stands in the plane of its meridian, and how fast the turning Earth carries it. */
export interface Meridian {
  /** p = (N + h) cos φ, distance from the axis. */
  readonly axisDistance: Metres;
  /** z = (N(1 − e²) + h) sin φ, north positive. */
  readonly z: Metres;
  /** φ′ = atan2(z, p). */
  readonly geocentricLatitude: Radians;
  /** v_e = ω p, due east. */
  readonly rotationSpeed: MetresPerSecond;
}

/**
 * The site in its meridian plane on the WGS 84 ellipsoid, N = a/√(1 − e² sin²φ).
 * @param latitude geodetic, −π/2…π/2, north positive
 * @param height above the ellipsoid
 * @see references.wgs84, tests/reference/geodesy.csv
 */
export function meridianOf(latitude: Radians, height: Metres): Meridian {
  const sin = Math.sin(latitude);
  const normal = A / Math.sqrt(1 - ECCENTRICITY_SQUARED * sin * sin);
  const axisDistance = (normal + height) * exactCos(latitude);
  const z = (normal * (1 - ECCENTRICITY_SQUARED) + height) * sin;
  return {
    axisDistance: metres(axisDistance),
    z: metres(z),
    geocentricLatitude: radians(Math.atan2(z, axisDistance)),
    rotationSpeed: metresPerSecond(constants.rotationRate.value * axisDistance),
  };
}

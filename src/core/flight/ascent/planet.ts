import { constants } from '../../constants.ts';
import { ECCENTRICITY_SQUARED } from '../earth.ts';

/** The turning Earth of a flight: WGS 84, or the round one of a published benchmark. SI. */
export interface Planet {
  /** μ in m³/s². */
  readonly gravitationalParameter: number;
  /** a in m. */
  readonly equatorialRadius: number;
  /** e² of the ellipsoid; 0 for a sphere. */
  readonly eccentricitySquared: number;
  /** J₂; 0 for central gravity. */
  readonly secondZonalHarmonic: number;
  /** ω in rad/s, about +z. */
  readonly rotationRate: number;
  /** g₀ in m/s², which turns specific impulse into exhaust speed. */
  readonly standardGravity: number;
}

/** The Earth of section 8: WGS 84 ellipsoid, central gravity plus J₂. @see references.wgs84 */
export const EARTH: Planet = {
  gravitationalParameter: constants.gravitationalParameter.value,
  equatorialRadius: constants.equatorialRadius.value,
  eccentricitySquared: ECCENTRICITY_SQUARED,
  secondZonalHarmonic: constants.secondZonalHarmonic.value,
  rotationRate: constants.rotationRate.value,
  standardGravity: constants.standardGravity.value,
};

/** Geodetic place of a point. */
export interface GeodeticPlace {
  /** rad, north positive. */
  readonly latitude: number;
  /** Above the ellipsoid in m. */
  readonly height: number;
}

/**
 * Geodetic latitude and height by Bowring's formula, iterated until the latitude stands.
 * @param axisDistance p ≥ 0 and `z`, north positive, in m
 * @see references.wgs84, tests/core/flight/ascent/integration.test.ts
 */
export function geodeticOf(planet: Planet, axisDistance: number, z: number): GeodeticPlace {
  const e2 = planet.eccentricitySquared;
  const a = planet.equatorialRadius;
  const b = a * Math.sqrt(1 - e2);
  let reduced = Math.atan2(z, axisDistance * Math.sqrt(1 - e2));
  let latitude = 0;
  // Each turn shrinks the error by e⁴ or so; five leave nothing of it at any height that is flown.
  for (let turn = 0; turn < 5; turn++) {
    const sin = Math.sin(reduced);
    const cos = Math.cos(reduced);
    latitude = Math.atan2(z + (e2 / (1 - e2)) * b * sin ** 3, axisDistance - e2 * a * cos ** 3);
    reduced = Math.atan2(b * Math.sin(latitude), a * Math.cos(latitude));
  }
  const sin = Math.sin(latitude);
  const normal = a / Math.sqrt(1 - e2 * sin * sin);
  // p cos φ + z sin φ − N(1 − e² sin²φ) holds at the poles as well as at the equator.
  const height = axisDistance * Math.cos(latitude) + z * sin - normal * (1 - e2 * sin * sin);
  return { latitude, height };
}

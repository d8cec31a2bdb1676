import { meridianOf } from '../earth.ts';
import type { Site } from '../types.ts';

/** The site in the inertial frame at lift-off, its meridian the frame's: longitudes count from it. */
export interface LaunchPoint {
  readonly place: Float64Array;
  readonly up: Float64Array;
  readonly east: Float64Array;
  readonly north: Float64Array;
}

/** A site on its pad: place in m, and the directions of its horizon on the ellipsoid. */
export function launchPointOf({ latitude, height }: Pick<Site, 'latitude' | 'height'>): LaunchPoint {
  const { axisDistance, z } = meridianOf(latitude, height);
  const [sin, cos] = [Math.sin(latitude), Math.cos(latitude)];
  return {
    place: Float64Array.of(axisDistance, 0, z),
    up: Float64Array.of(cos, 0, sin),
    east: Float64Array.of(0, 1, 0),
    north: Float64Array.of(-sin, 0, cos),
  };
}

import type { MetresPerSecond, Radians } from '../units.ts';
import { meridianOf } from './earth.ts';
import { sectorsOf } from './sectors.ts';
import type { Sectors } from './sectors.ts';
import type { Site } from './types.ts';

/** What a site gives, worked out once for every orbit. */
export interface Pad {
  readonly site: Site;
  readonly geocentricLatitude: Radians;
  readonly sinLatitude: number;
  readonly cosLatitude: number;
  readonly rotationSpeed: MetresPerSecond;
  readonly sectors: Sectors;
}

/** @throws RangeError for a sector whose bounds are equal */
export function padOf(site: Site): Pad {
  const { axisDistance, z, geocentricLatitude, rotationSpeed } = meridianOf(site.latitude, site.height);
  const radius = Math.hypot(axisDistance, z);
  return {
    site,
    geocentricLatitude,
    sinLatitude: z / radius,
    cosLatitude: axisDistance / radius,
    rotationSpeed,
    sectors: sectorsOf(site.sectors),
  };
}

import { radians } from '../units.ts';
import type { MetresPerSecond, Radians } from '../units.ts';
import type { Pad } from './pad.ts';
import { isPermitted } from './sectors.ts';
import { legAlong } from './ways.ts';

const DUE_EAST = Math.PI / 2;

/**
 * The lowest inclination a site flies directly: |φ′| where due east is permitted, else the lowest of those flown along
 * its sectors' edges, since cos i = cos φ′ sin β falls away from due east on both sides.
 * @param pad the site
 * @param injectionSpeed v_i, inertial; a circular orbit's at the parking altitude
 * @returns 0…π; above π/2 where only retrograde azimuths are permitted
 * @see references.launchAzimuth, tests/core/flight/lowest-inclination.test.ts
 */
export function lowestInclination(pad: Pad, injectionSpeed: MetresPerSecond): Radians {
  if (isPermitted(pad.sectors, DUE_EAST)) return radians(Math.abs(pad.geocentricLatitude));
  return radians(
    Math.min(...pad.sectors.edges.map((edge) => legAlong(pad, edge, injectionSpeed).inclination)),
  );
}

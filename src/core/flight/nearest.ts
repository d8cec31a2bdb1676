import { radians } from '../units.ts';
import type { Radians } from '../units.ts';
import type { Target } from './injection.ts';
import type { Pad } from './pad.ts';
import { isPermitted } from './sectors.ts';
import { legAlong, nearestFlown } from './ways.ts';

/**
 * The nearest inclination that a pad's permitted azimuths give without a turn, for an orbit that is out of reach:
 * due east or west where permitted, else the nearest of the planes along the sectors' edges.
 */
export function nearestReached(pad: Pad, target: Target): Radians {
  const azimuth = target.inclination <= Math.PI / 2 ? Math.PI / 2 : 1.5 * Math.PI;
  if (isPermitted(pad.sectors, azimuth)) return radians(nearestFlown(pad, target));
  const planes = target.injections.flatMap(({ speed }) =>
    pad.sectors.edges.map((edge) => legAlong(pad, edge, speed).inclination),
  );
  const distance = (plane: number) => Math.abs(plane - target.inclination);
  return radians(planes.reduce((best, plane) => (distance(plane) < distance(best) ? plane : best)));
}

import { constants } from '../constants.ts';
import { ECCENTRICITY_SQUARED as e2 } from '../flight/earth.ts';
import { UNITS_PER_DEG } from './data/cells.ts';

const a = constants.equatorialRadius.value;
const e = Math.sqrt(e2);
const UNIT = Math.PI / 180 / UNITS_PER_DEG;

/** q of authalic latitude: 2π a² q/2 is the area between the equator and a parallel, north positive. */
function authalic(latitude: number): number {
  const sin = Math.sin(latitude);
  return (1 - e2) * (sin / (1 - e2 * sin * sin) + Math.atanh(e * sin) / e);
}

/**
 * Area on the ellipsoid of a ring drawn in the plane of degrees, its sides straight there: −a²/2 ∮ q dλ, with
 * Simpson's rule along each side. Exact along meridians and parallels; a side of 2° is right to 1e-9.
 * @param ring longitude, latitude, … in units of 0.0001°, the first point not repeated
 * @returns m², positive where the ring runs counterclockwise
 * @see downrangeReferences.snyder, tests/core/downrange/area.test.ts
 */
export function ringArea(ring: ArrayLike<number>): number {
  const points = ring.length;
  let sum = 0;
  for (let at = 0; at < points; at += 2) {
    const next = (at + 2) % points;
    const step = (ring[next] as number) - (ring[at] as number);
    if (step === 0) continue;
    const [from, to] = [(ring[at + 1] as number) * UNIT, (ring[next + 1] as number) * UNIT];
    const mean =
      from === to ? authalic(from) : (authalic(from) + 4 * authalic((from + to) / 2) + authalic(to)) / 6;
    sum -= step * UNIT * mean;
  }
  return (a * a * sum) / 2;
}

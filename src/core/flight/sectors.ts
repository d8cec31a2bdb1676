import type { Radians } from '../units.ts';
import { ANGLE_SLACK, TURN, wrap } from './azimuths.ts';
import type { Sector } from './types.ts';

/** An edge of a sector, ready for the legs flown along it. */
export interface Edge {
  /** Place among the site's distinct edges, in the order given. */
  readonly index: number;
  readonly azimuth: Radians;
  readonly sin: number;
  readonly cos: number;
}

/** A site's sectors with their starts and widths laid flat, and their distinct edges in the order given. */
export interface Sectors {
  readonly starts: Float64Array;
  readonly widths: Float64Array;
  readonly edges: readonly Edge[];
}

function widthOf({ from, to }: Sector): number {
  const width = to - from;
  if (width === 0 || Math.abs(width) > TURN) {
    throw new RangeError(`sectorsOf: no sector from ${from} to ${to} rad`);
  }
  return width < 0 ? width + TURN : width;
}

function apart(a: number, b: number): number {
  const distance = Math.abs(a - b);
  return Math.min(distance, TURN - distance);
}

function edgesOf(sectors: readonly Sector[]): Edge[] {
  const edges: Edge[] = [];
  for (const bound of sectors.flatMap(({ from, to }) => [from, to])) {
    const azimuth = wrap(bound);
    if (edges.some((edge) => apart(edge.azimuth, azimuth) <= ANGLE_SLACK)) continue;
    edges.push({ index: edges.length, azimuth, sin: Math.sin(azimuth), cos: Math.cos(azimuth) });
  }
  return edges;
}

/** @throws RangeError for a sector whose bounds are equal */
export function sectorsOf(sectors: readonly Sector[]): Sectors {
  return {
    starts: Float64Array.from(sectors, ({ from }) => wrap(from)),
    widths: Float64Array.from(sectors, widthOf),
    edges: edgesOf(sectors),
  };
}

/** Whether a launch azimuth (0…2π) may be flown; without sectors every azimuth may. */
export function isPermitted({ starts, widths }: Sectors, azimuth: number): boolean {
  if (starts.length === 0) return true;
  for (let k = 0; k < starts.length; k++) {
    const past = azimuth - (starts[k] as number);
    const clockwise = past < 0 ? past + TURN : past;
    if (clockwise <= (widths[k] as number) + ANGLE_SLACK || clockwise >= TURN - ANGLE_SLACK) return true;
  }
  return false;
}

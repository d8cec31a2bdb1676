import { fromDegrees, radians, toDegrees } from '../units.ts';
import type { MetresPerSecond } from '../units.ts';
import type { Pad } from '../flight/pad.ts';
import { isPermitted, sectorsOf } from '../flight/sectors.ts';
import type { Sectors } from '../flight/sectors.ts';
import { legAlong } from '../flight/ways.ts';
import type { Spoke } from './fan.ts';

/** Limits a study sets on an azimuth; null where it sets none. */
export interface FanLimits {
  /** Least distance to the first land, m. */
  readonly clearDistance: number | null;
  /** Most people in the corridor, spread people included where they are counted. */
  readonly people: number | null;
  /** Whether the overflight exclusion zone has to hold no listed settlement. */
  readonly exclusionEmpty: boolean;
}

/** Azimuths from one whole degree to another, clockwise; 0 to 360 is all round. */
export interface OpenSector {
  readonly fromDeg: number;
  readonly toDeg: number;
  /** False where somewhere in it people are unknown, so that a limit on people is kept only as far as is known. */
  readonly complete: boolean;
}

/** Whether everyone in an azimuth's corridor is known of, by the data. */
const isComplete = ({ withoutFigure, spread }: Spoke): boolean =>
  withoutFigure === 0 && (spread === null || spread.unknownLand === 0);

/** Whether one azimuth keeps within the limits. A line that never leaves land has no clear distance. */
export function keepsWithin(spoke: Spoke, { clearDistance, people, exclusionEmpty }: FanLimits): boolean {
  const { first } = spoke;
  const clear = first.coast === null ? 0 : (first.land?.distance ?? Infinity);
  if (clearDistance !== null && clear < clearDistance) return false;
  if (people !== null && spoke.people + (spoke.spread?.people ?? 0) > people) return false;
  return !exclusionEmpty || spoke.excludedSettlements === 0;
}

/**
 * The sectors whose azimuths all keep within the limits, each from its first whole degree to its last. Only whole
 * degrees are looked at, and one that stands alone makes no sector.
 * @param fan every whole degree from 0
 */
export function openSectors(fan: readonly Spoke[], limits: FanLimits): OpenSector[] {
  const open = fan.map((spoke) => keepsWithin(spoke, limits));
  if (open.length > 0 && open.every(Boolean))
    return [{ fromDeg: 0, toDeg: 360, complete: fan.every(isComplete) }];
  const count = open.length;
  const starts = open.flatMap((is, at) => (is && !open[(at + count - 1) % count] ? [at] : []));
  return starts.flatMap((fromDeg) => {
    let length = 0;
    while (open[(fromDeg + length + 1) % count]) length += 1;
    if (length === 0) return [];
    const held = Array.from({ length: length + 1 }, (_, step) => fan[(fromDeg + step) % count] as Spoke);
    return [{ fromDeg, toDeg: (fromDeg + length) % count, complete: held.every(isComplete) }];
  });
}

/** Degrees of azimuth that sectors hold together. */
export const openWidth = (sectors: readonly Pick<OpenSector, 'fromDeg' | 'toDeg'>[]): number =>
  sectors.reduce(
    (sum, { fromDeg, toDeg }) => sum + (toDeg > fromDeg ? toDeg - fromDeg : toDeg - fromDeg + 360),
    0,
  );

/** Inclinations that a sector opens, both ends included. */
export interface OpenInclinations {
  readonly fromDeg: number;
  readonly toDeg: number;
}

function inclinationsOf(pad: Pad, sector: Sectors, injectionSpeed: MetresPerSecond): number[] {
  const edges = sector.edges.map((edge) => legAlong(pad, edge, injectionSpeed).inclination);
  const lowest = Math.abs(pad.geocentricLatitude);
  // cos i = cos φ′ sin β turns back only where the flight goes due east or due west.
  if (isPermitted(sector, Math.PI / 2)) edges.push(lowest);
  if (isPermitted(sector, 1.5 * Math.PI)) edges.push(Math.PI - lowest);
  return edges;
}

/**
 * The inclinations flown without a turn along each sector's launch azimuths, overlapping ones joined.
 * @param injectionSpeed v_i, inertial; a circular orbit's at the parking altitude
 * @see references.launchAzimuth, tests/core/downrange/open-sectors.test.ts
 */
export function inclinationsOpened(
  pad: Pad,
  sectors: readonly Pick<OpenSector, 'fromDeg' | 'toDeg'>[],
  injectionSpeed: MetresPerSecond,
): OpenInclinations[] {
  const spans = sectors
    .map(({ fromDeg, toDeg }) => {
      const sector = sectorsOf([{ from: fromDegrees(fromDeg), to: fromDegrees(toDeg) }]);
      const found = inclinationsOf(pad, sector, injectionSpeed).map((angle) => toDegrees(radians(angle)));
      return { fromDeg: Math.min(...found), toDeg: Math.max(...found) };
    })
    .sort((a, b) => a.fromDeg - b.fromDeg);
  return spans.reduce<OpenInclinations[]>((joined, span) => {
    const last = joined.at(-1);
    if (!last || span.fromDeg > last.toDeg) return [...joined, span];
    return [...joined.slice(0, -1), { fromDeg: last.fromDeg, toDeg: Math.max(last.toDeg, span.toDeg) }];
  }, []);
}

import type { FanSpoke } from '#contract/downrange.ts';

/** The fan's circles, px from its middle: people from the base inwards, distance from the base outwards. */
export const INNER = 62;
export const BASE = 124;
export const OUTER = 208;
/** People at the innermost end of a bar, as a power of ten. */
const MOST_POWER = 9;

export type Point = readonly [x: number, y: number];

/** A point at an azimuth and a radius, from the middle; north is up. */
export function at(azimuthDeg: number, radius: number): Point {
  const angle = (azimuthDeg * Math.PI) / 180;
  return [radius * Math.sin(angle), -radius * Math.cos(angle)];
}

/** The azimuth that a point lies at from the middle, whole degrees, 0 to 359. */
export function azimuthAt(x: number, y: number): number {
  const degrees = Math.round((Math.atan2(x, -y) * 180) / Math.PI);
  return (degrees + 360) % 360;
}

/** Listed people, with those spread over the land where they are counted. */
export const peopleOf = ({ people, spreadPeople }: FanSpoke): number => people + (spreadPeople ?? 0);

/** Radius that people's bar ends at; the base where there are none. */
export function peopleRadius(people: number): number {
  const power = Math.min(MOST_POWER, Math.log10(1 + Math.max(0, people)));
  return BASE - (power / MOST_POWER) * (BASE - INNER);
}

/** The clear distance, km: to the first land; none where the line never leaves land; null where none was found. */
export const clearKm = ({ coastKm, firstLandKm }: FanSpoke): number | null =>
  coastKm === null ? 0 : firstLandKm;

export function distanceRadius(km: number | null, rangeKm: number): number {
  return BASE + (Math.min(km ?? rangeKm, rangeKm) / rangeKm) * (OUTER - BASE);
}

const write = ([x, y]: Point): string => `${x.toFixed(2)} ${y.toFixed(2)}`;

/** A bar half a degree to either side of an azimuth between two radii; nothing where it has no length. */
export function barPath(azimuthDeg: number, from: number, to: number): string {
  if (Math.abs(to - from) < 0.05) return '';
  const [left, right] = [azimuthDeg - 0.5, azimuthDeg + 0.5];
  const corners = [at(left, from), at(left, to), at(right, to), at(right, from)].map(write);
  return `M${corners.join('L')}Z`;
}

/** A sector of a ring, clockwise from one azimuth to another. */
export function ringPath(fromDeg: number, toDeg: number, inner: number, outer: number): string {
  const width = (((toDeg - fromDeg) % 360) + 360) % 360;
  if (width === 0) return `${circlePath(outer)}${circlePath(inner, 0)}`;
  const large = width > 180 ? 1 : 0;
  return `M${write(at(fromDeg, outer))}A${outer} ${outer} 0 ${large} 1 ${write(at(toDeg, outer))}L${write(at(toDeg, inner))}A${inner} ${inner} 0 ${large} 0 ${write(at(fromDeg, inner))}Z`;
}

/** A circle about the middle; `sweep` 0 runs the other way round, for a hole. */
export function circlePath(radius: number, sweep: 0 | 1 = 1): string {
  const [top, foot] = [write([0, -radius]), write([0, radius])];
  return `M${top}A${radius} ${radius} 0 1 ${sweep} ${foot}A${radius} ${radius} 0 1 ${sweep} ${top}Z`;
}

/** Circles of distance with their labels: three or four round figures within the range. */
export function distanceTicks(rangeKm: number): number[] {
  const step = [100, 250, 500, 1000, 2500].find((one) => rangeKm / one <= 4) ?? 2500;
  return Array.from({ length: Math.floor(rangeKm / step) }, (_, at) => (at + 1) * step);
}

/** Circles of people: a thousand, a million, a thousand million. */
export const PEOPLE_TICKS = [
  { people: 1e3, name: '1,000' },
  { people: 1e6, name: '1 million' },
] as const;

/** Runs of neighbouring azimuths for which something holds, as arcs half a degree wider at both ends. */
export function arcsOf(
  spokes: readonly FanSpoke[],
  holds: (spoke: FanSpoke) => boolean,
): readonly (readonly [fromDeg: number, toDeg: number])[] {
  const flags = spokes.map(holds);
  if (flags.every(Boolean)) return flags.length > 0 ? [[0, 360]] : [];
  const count = flags.length;
  return flags.flatMap((flag, from) => {
    if (!flag || flags[(from + count - 1) % count]) return [];
    let to = from;
    while (flags[(to + 1) % count]) to += 1;
    return [[from - 0.5, to + 0.5] as const];
  });
}

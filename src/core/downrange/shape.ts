import type { Metres } from '../units.ts';
import { CLASS_DIMENSIONS, LONGEST_RANGE, WIDTH_RANGES } from './vehicle-class.ts';
import type { VehicleClass } from './vehicle-class.ts';

/**
 * The outline of a corridor in strip coordinates: s along the flight line from the launch point, y square to it,
 * both on the ellipsoid. Half of the outline; the other half is its mirror.
 */
export interface Shape {
  /** D_max. */
  readonly circleRadius: Metres;
  /** D_OEZ. */
  readonly exclusionLength: Metres;
  /** Where the corridor ends. */
  readonly range: Metres;
  /** Corners (s, y): the tangent's point on the circle (B), then at 10, 100 and 5,000 nautical miles (C, D, H). */
  readonly corners: readonly (readonly [number, number])[];
}

/** Where the tangent from (s, y) touches the circle about the launch point, on the side that is behind. */
function tangentPoint(radius: number, s: number, y: number): readonly [number, number] {
  const distance = Math.hypot(s, y);
  const angle = Math.atan2(y, s) + Math.acos(radius / distance);
  return [radius * Math.cos(angle), radius * Math.sin(angle)];
}

/**
 * The corridor's outline for a class: an arc about the launch point, its tangents to the ends of the line at 10
 * nautical miles, then straight to those at 100 and 5,000, where straight means that the half-width grows evenly with
 * the distance flown.
 * @param range m, above the length of the exclusion zone, at most 5,000 nautical miles
 * @throws RangeError for a range outside those
 * @see downrangeReferences.appendixA, tests/reference/corridor.csv
 */
export function shapeOf(vehicleClass: VehicleClass, range: Metres): Shape {
  const { circleRadius, exclusionLength, halfWidths } = CLASS_DIMENSIONS[vehicleClass];
  // A whisker of slack: 5,000 nautical miles come back from kilometres a few nanometres long.
  if (!(range > exclusionLength && range <= LONGEST_RANGE + 1e-3))
    throw new RangeError(`shapeOf: range of ${range} m`);
  const corners = halfWidths.map((half, at) => [WIDTH_RANGES[at] as number, half as number] as const);
  const [nearest = [0, 0] as const] = corners;
  const tangent = tangentPoint(circleRadius, nearest[0], nearest[1]);
  return { circleRadius, exclusionLength, range, corners: [tangent, ...corners] };
}

/** Half of the corridor's width at a distance along the flight line; negative where the corridor has none. */
export function halfWidthAt({ circleRadius, range, corners }: Shape, s: number): number {
  if (s < -circleRadius || s > range) return -1;
  let [s0, y0] = corners[0] as readonly [number, number];
  if (s <= s0) return Math.sqrt(circleRadius * circleRadius - s * s);
  for (let at = 1; at < corners.length; at += 1) {
    const [s1, y1] = corners[at] as readonly [number, number];
    if (s <= s1) return y0 + ((s - s0) / (s1 - s0)) * (y1 - y0);
    [s0, y0] = [s1, y1];
  }
  return y0;
}

/** Whether strip coordinates lie in the corridor. */
export const inCorridor = (shape: Shape, s: number, y: number): boolean =>
  Math.abs(y) <= halfWidthAt(shape, s);

/** Whether strip coordinates lie in the overflight exclusion zone: two half-circles joined by parallels. */
export function inExclusionZone({ circleRadius, exclusionLength }: Shape, s: number, y: number): boolean {
  const beyond = s < 0 ? s : Math.max(0, s - exclusionLength);
  return Math.hypot(beyond, y) <= circleRadius;
}

/** Area of the exclusion zone in the plane, πD² + 2 D L. */
export const exclusionArea = ({ circleRadius: D, exclusionLength: L }: Shape): number =>
  Math.PI * D * D + 2 * D * L;

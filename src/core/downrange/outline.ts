import { NAUTICAL_MILE } from './vehicle-class.ts';
import { halfWidthAt } from './shape.ts';
import type { Shape } from './shape.ts';

/**
 * A closed outline in strip coordinates, counterclockwise where the flight line points up and y counts to the right;
 * the first point is not repeated.
 */
export type Outline = readonly (readonly [s: number, y: number])[];

/** Steps of a half-circle: chords lose 0.05 % of a circle's area. */
const ARC_STEPS = 60;
/** A chord of this length in the plane of degrees strays from the geodesic by less than 10 m × tan φ. */
const SIDE_STEP = 10 * NAUTICAL_MILE;

/** Points of an arc about (s, 0), both ends included. */
function arc(s: number, radius: number, from: number, to: number): [number, number][] {
  return Array.from({ length: ARC_STEPS + 1 }, (_, step) => {
    const angle = from + (step / ARC_STEPS) * (to - from);
    return [s + radius * Math.cos(angle), radius * Math.sin(angle)];
  });
}

/** Even steps of at most SIDE_STEP from one figure to another, the last included, the first not. */
function stepsBetween(from: number, to: number): number[] {
  const count = Math.max(1, Math.ceil(Math.abs(to - from) / SIDE_STEP));
  return Array.from({ length: count }, (_, step) => from + ((step + 1) / count) * (to - from));
}

/** The right side, from the tangent's point on the circle to the corridor's end. */
function rightSide(shape: Shape): [number, number][] {
  const side: [number, number][] = [];
  let from = shape.corners[0]?.[0] ?? 0;
  for (const [corner] of shape.corners.slice(1)) {
    const to = Math.min(corner, shape.range);
    if (to <= from) break;
    for (const s of stepsBetween(from, to)) side.push([s, halfWidthAt(shape, s)]);
    from = to;
  }
  return side;
}

/** The corridor: out along the right side, across its end, back along the left, round behind the launch point. */
export function corridorOutline(shape: Shape): Outline {
  const right = rightSide(shape);
  const [end, half] = right.at(-1) as [number, number];
  const across = stepsBetween(half, -half).slice(0, -1);
  const [tangentS, tangentY] = shape.corners[0] as readonly [number, number];
  const behind = Math.atan2(tangentY, tangentS);
  return [
    ...right,
    ...across.map((y): [number, number] => [end, y]),
    ...right.map(([s, y]): [number, number] => [s, -y]).reverse(),
    ...arc(0, shape.circleRadius, 2 * Math.PI - behind, behind),
  ];
}

/** The overflight exclusion zone: two half-circles of the circle's radius joined by parallels. */
export function exclusionOutline({ circleRadius, exclusionLength }: Shape): Outline {
  return [
    ...arc(exclusionLength, circleRadius, Math.PI / 2, -Math.PI / 2),
    ...arc(0, circleRadius, 1.5 * Math.PI, Math.PI / 2),
  ];
}

/** The circle about the launch point. */
export const circleOutline = ({ circleRadius }: Shape): Outline => [
  ...arc(0, circleRadius, 2 * Math.PI, Math.PI).slice(1),
  ...arc(0, circleRadius, Math.PI, 0).slice(1),
];

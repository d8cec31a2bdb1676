import { containsPlace, isExcluded } from './corridor.ts';
import type { Corridor } from './corridor.ts';
import { between } from './geodesic.ts';
import { clearance, polarError, radiusBetween, reachOf, widestTurns } from './polar.ts';
import { Tally } from './runs.ts';
import type { Settlements } from './settlements.ts';
import type { Shape } from './shape.ts';
import { MEAN_RADIUS, ROUGH_ERROR, directionOf, dot } from './strip.ts';

/** People and settlements of each corridor of a fan, and of its exclusion zone. */
export interface FanCounts {
  readonly people: Float64Array;
  readonly settlements: Float64Array;
  /** Settlements without a figure of people. */
  readonly withoutFigure: Float64Array;
  readonly excludedPeople: Float64Array;
  readonly excludedSettlements: Float64Array;
}

const RADIAN = Math.PI / 180;

/** One settlement as the launch point sees it. */
interface Sight {
  readonly distance: number;
  readonly azimuthDeg: number;
  /** The sphere's, halfway to it. */
  readonly radius: number;
  /** Whether the corridor at a whole degree holds it, asked of the ellipsoid. */
  readonly holds: (degree: number) => boolean;
}

/** The run of whole degrees, unwrapped, whose corridors hold a place; the ellipsoid is asked where it is close. */
function runOf(shape: Shape, sight: Sight, widestTurn: number): readonly [number, number] {
  const { distance, azimuthDeg, radius, holds } = sight;
  const doubt = polarError(distance);
  const settled = (degree: number): boolean => {
    const margin = clearance(shape, distance, (degree - azimuthDeg) * RADIAN, radius);
    return Math.abs(margin) > doubt ? margin > 0 : holds(degree);
  };
  let from = Math.ceil(azimuthDeg - widestTurn / RADIAN);
  let to = Math.floor(azimuthDeg + widestTurn / RADIAN);
  if (settled(from - 1)) from -= 1;
  else if (!settled(from)) from += 1;
  if (settled(to + 1)) to += 1;
  else if (!settled(to)) to -= 1;
  return [from, to];
}

/** Settlements that any corridor of the fan can hold, by their place in the data. */
function withinReach({ shape, start }: Corridor, settlements: Settlements): number[] {
  const reach = reachOf(shape) * (1 + ROUGH_ERROR) + shape.circleRadius;
  const least = Math.cos(Math.min(Math.PI, reach / MEAN_RADIUS));
  const up = directionOf(start);
  const found: number[] = [];
  for (let at = 0; at < settlements.count; at += 1)
    if (dot(settlements.direction(at), up) >= least) found.push(at);
  return found;
}

/** A fan's corridors, with what is worked out once for all of them. */
interface Fan {
  readonly corridors: readonly Corridor[];
  readonly shape: Shape;
  readonly launch: Corridor;
  /** The widest turn at which a place at a distance lies inside. */
  readonly widest: (distance: number) => number;
}

/** Whole degrees at which something holds, each a run of its own. */
const degreesWhere = (fan: Fan, holds: (corridor: Corridor) => boolean): number[] =>
  fan.corridors.flatMap((corridor, degree) => (holds(corridor) ? [degree] : []));

function countSettlement(
  fan: Fan,
  settlements: Settlements,
  at: number,
  inside: Tally,
  excluded: Tally,
): void {
  const { corridors, shape, launch, widest } = fan;
  const [place, direction, people] = [
    settlements.place(at),
    settlements.direction(at),
    settlements.people(at),
  ];
  const { distance, azimuthDeg } = between(launch.start, place);
  if (distance < (shape.exclusionLength + shape.circleRadius) * 1.01)
    for (const degree of degreesWhere(fan, (corridor) => isExcluded(corridor, place, direction)))
      excluded.add(degree, degree, people);
  const near = polarError(distance);
  if (distance > shape.range - 2 * near || distance < shape.circleRadius + 2 * near) {
    // At the circle and at the corridor's end: few places, and more than one edge to mind.
    for (const degree of degreesWhere(fan, (corridor) => containsPlace(corridor, place, direction)))
      inside.add(degree, degree, people);
    return;
  }
  const count = corridors.length;
  const holds = (degree: number): boolean =>
    containsPlace(corridors[((degree % count) + count) % count] as Corridor, place, direction);
  const sight = { distance, azimuthDeg, radius: radiusBetween(launch.strip.up, direction), holds };
  inside.add(...runOf(shape, sight, widest(distance)), people);
}

/**
 * Counts the settlements in every corridor of a fan: each settlement's distance and azimuth say at once for which
 * azimuths it lies inside, so that it is looked at once and not once a corridor. The counts are those of the
 * corridors taken one by one.
 * @param corridors of one shape from one launch point, at 0°, 1°, 2° … all the way round
 */
export function countFan(corridors: readonly Corridor[], settlements: Settlements): FanCounts {
  const [launch] = corridors;
  if (!launch) throw new RangeError('countFan: no corridors');
  const { shape } = launch;
  const fan: Fan = { corridors, shape, launch, widest: widestTurns(shape) };
  const [inside, excluded] = [new Tally(corridors.length), new Tally(corridors.length)];
  for (const at of withinReach(launch, settlements)) countSettlement(fan, settlements, at, inside, excluded);
  return {
    people: inside.people.sums(),
    settlements: inside.settlements.sums(),
    withoutFigure: inside.withoutFigure.sums(),
    excludedPeople: excluded.people.sums(),
    excludedSettlements: excluded.settlements.sums(),
  };
}

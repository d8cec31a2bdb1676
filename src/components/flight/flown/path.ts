import type { TrajectoryPoint } from '#contract/ascent.ts';
import { placeOf } from './profile.ts';

/** [longitude°, latitude°]; longitudes run on past 180° so that a path never jumps. */
export type PathPlace = [longitudeDeg: number, latitudeDeg: number];

interface Place {
  longitudeDeg: number;
  latitudeDeg: number;
}

/** Longitudes as one unbroken path from the first one. */
function unbroken(places: readonly Place[]): PathPlace[] {
  let last = places[0]?.longitudeDeg ?? 0;
  return places.map(({ longitudeDeg, latitudeDeg }) => {
    last = longitudeDeg - 360 * Math.round((longitudeDeg - last) / 360);
    return [last, latitudeDeg];
  });
}

/** What the map draws of a flight. */
export interface FlightPath {
  ground: PathPlace[];
  /** Where it would come down, moment by moment, until it would no more. */
  impacts: PathPlace[];
  /** Times of the impacts' moments. */
  impactTimesS: number[];
  timesS: number[];
}

export function pathOf(points: readonly TrajectoryPoint[]): FlightPath {
  const falling = points.flatMap(({ timeS, impact }) =>
    impact.kind === 'impact' ? [{ ...impact, atS: timeS }] : [],
  );
  return {
    ground: unbroken(points),
    impacts: unbroken(falling),
    impactTimesS: falling.map(({ atS }) => atS),
    timesS: points.map(({ timeS }) => timeS),
  };
}

function placeAt(
  path: readonly PathPlace[],
  timesS: readonly number[],
  timeS: number,
): PathPlace | undefined {
  const { index, part } = placeOf(
    timesS.map((time) => ({ timeS: time })),
    timeS,
  );
  const [from, to] = [path[index], path[index + 1]];
  if (!from || !to || part === 0) return from;
  return [from[0] + (to[0] - from[0]) * part, from[1] + (to[1] - from[1]) * part];
}

/** Where the vehicle is over the ground at a time, and where it would come down; no impact once it is in orbit. */
export function placesAt(
  path: FlightPath,
  timeS: number,
): { vehicle: PathPlace | null; impact: PathPlace | null } {
  const falls = timeS <= (path.impactTimesS.at(-1) ?? -1);
  return {
    vehicle: placeAt(path.ground, path.timesS, timeS) ?? null,
    impact: falls ? (placeAt(path.impacts, path.impactTimesS, timeS) ?? null) : null,
  };
}

import { containsPlace, isExcluded } from './corridor.ts';
import type { Corridor } from './corridor.ts';
import { between } from './geodesic.ts';
import { clearance, polarError, radiusBetween, reachOf, widestTurns } from './polar.ts';
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

/** Adds to all of a run of whole degrees at once; sums are taken when every run is known. */
class Runs {
  readonly #steps: Float64Array;

  constructor(readonly count: number) {
    this.#steps = new Float64Array(count + 1);
  }

  /** From one whole degree to another, both included; they may run past north. */
  add(from: number, to: number, value: number): void {
    if (to < from) return;
    if (to - from >= this.count - 1) return this.#span(0, this.count - 1, value);
    const first = ((from % this.count) + this.count) % this.count;
    const last = first + to - from;
    this.#span(first, Math.min(last, this.count - 1), value);
    if (last >= this.count) this.#span(0, last - this.count, value);
  }

  #span(from: number, to: number, value: number): void {
    this.#steps[from] = (this.#steps[from] as number) + value;
    this.#steps[to + 1] = (this.#steps[to + 1] as number) - value;
  }

  sums(): Float64Array {
    const sums = new Float64Array(this.count);
    let sum = 0;
    for (let at = 0; at < this.count; at += 1) {
      sum += this.#steps[at] as number;
      sums[at] = sum;
    }
    return sums;
  }
}

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

/** The sums of a fan while it is counted. */
class Tally {
  readonly people: Runs;
  readonly settlements: Runs;
  readonly withoutFigure: Runs;

  constructor(count: number) {
    this.people = new Runs(count);
    this.settlements = new Runs(count);
    this.withoutFigure = new Runs(count);
  }

  add(from: number, to: number, people: number): void {
    this.people.add(from, to, people);
    this.settlements.add(from, to, 1);
    if (people === 0) this.withoutFigure.add(from, to, 1);
  }
}

/**
 * Counts the settlements in every corridor of a fan: each settlement's distance and azimuth say at once for which
 * azimuths it lies inside, so that it is looked at once and not once a corridor. The counts are those of the
 * corridors taken one by one.
 * @param corridors of one shape from one launch point, at 0°, 1°, 2° … all the way round
 */
export function countFan(corridors: readonly Corridor[], settlements: Settlements): FanCounts {
  const [first] = corridors;
  if (!first) throw new RangeError('countFan: no corridors');
  const { shape, start, strip } = first;
  const count = corridors.length;
  const [inside, excluded] = [new Tally(count), new Tally(count)];
  const widest = widestTurns(shape);
  const corridorAt = (degree: number): Corridor => corridors[((degree % count) + count) % count] as Corridor;
  const zoneReach = (shape.exclusionLength + shape.circleRadius) * 1.01;
  for (const at of withinReach(first, settlements)) {
    const [place, direction, people] = [
      settlements.place(at),
      settlements.direction(at),
      settlements.people(at),
    ];
    const { distance, azimuthDeg } = between(start, place);
    const holds = (degree: number): boolean => containsPlace(corridorAt(degree), place, direction);
    const near = polarError(distance);
    if (distance < zoneReach)
      for (let degree = 0; degree < count; degree += 1)
        if (isExcluded(corridorAt(degree), place, direction)) excluded.add(degree, degree, people);
    if (distance > shape.range - 2 * near || distance < shape.circleRadius + 2 * near) {
      // At the circle and at the corridor's end: few places, and more than one edge to mind.
      for (let degree = 0; degree < count; degree += 1) if (holds(degree)) inside.add(degree, degree, people);
      continue;
    }
    const sight = { distance, azimuthDeg, radius: radiusBetween(strip.up, direction), holds };
    inside.add(...runOf(shape, sight, widest(distance)), people);
  }
  return {
    people: inside.people.sums(),
    settlements: inside.settlements.sums(),
    withoutFigure: inside.withoutFigure.sums(),
    excludedPeople: excluded.people.sums(),
    excludedSettlements: excluded.settlements.sums(),
  };
}

import type { Metres } from '../units.ts';
import { corridorOf } from './corridor.ts';
import { countFan } from './fan-settlements.ts';
import { spreadOverFan } from './fan-spread.ts';
import type { Place } from './geodesic.ts';
import { firstLand } from './path-over-land.ts';
import type { FirstLand } from './path-over-land.ts';
import type { SpreadCount } from './spread.ts';
import type { VehicleClass } from './vehicle-class.ts';
import type { World } from './world.ts';

/** Whole degrees of launch azimuth. */
export const AZIMUTHS = 360;

/** One azimuth of a fan. */
export interface Spoke {
  /** Whole degrees, 0…359, clockwise from north. */
  readonly azimuthDeg: number;
  readonly first: FirstLand;
  /** In the corridor's settlements, by the gazetteer. */
  readonly people: number;
  readonly settlements: number;
  /** Of these, without a figure of people: unknown, not none. */
  readonly withoutFigure: number;
  /** Null where spreading is switched off. */
  readonly spread: SpreadCount | null;
  /** In the settlements of the overflight exclusion zone. */
  readonly excludedPeople: number;
  readonly excludedSettlements: number;
}

/**
 * The azimuth fan: for every whole degree the corridor of the class, its first land along the flight line and the
 * people in it out to the range.
 * @param placeDensity people to the square metre within a settlement; null switches spreading off
 * @throws RangeError as corridorOf
 * @see tests/core/downrange/fan.test.ts
 */
export function azimuthFan(
  world: World,
  start: Place,
  vehicleClass: VehicleClass,
  range: Metres,
  placeDensity: number | null,
): Spoke[] {
  const corridors = Array.from({ length: AZIMUTHS }, (_, azimuthDeg) =>
    corridorOf(start, azimuthDeg, vehicleClass, range),
  );
  const counts = countFan(corridors, world.settlements);
  const spread = placeDensity === null ? null : spreadOverFan(corridors, world.spread(placeDensity));
  return corridors.map(({ strip, shape }, azimuthDeg) => ({
    azimuthDeg,
    first: firstLand(world.map, strip.path, shape.range, shape.circleRadius),
    people: counts.people[azimuthDeg] as number,
    settlements: counts.settlements[azimuthDeg] as number,
    withoutFigure: counts.withoutFigure[azimuthDeg] as number,
    spread: spread?.[azimuthDeg] ?? null,
    excludedPeople: counts.excludedPeople[azimuthDeg] as number,
    excludedSettlements: counts.excludedSettlements[azimuthDeg] as number,
  }));
}

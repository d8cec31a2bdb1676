import { around } from 'geokdbush';
import { nearestCoast, isOnLand } from './coast.ts';
import type { NearestCoast } from './coast.ts';
import { between, destination } from './geodesic.ts';
import type { Place } from './geodesic.ts';
import { landInside } from './land-inside.ts';
import { planarRings } from './planar.ts';
import type { Settlements } from './settlements.ts';
import type { SpreadCount } from './spread.ts';
import type { World } from './world.ts';

/** Distances about a site that its people are counted within, m. */
export const RADII = [5e3, 10e3, 25e3, 50e3, 100e3] as const;
/** Sizes that the nearest settlement is named for: so many people and more. */
export const SIZES = [1e3, 10e3, 100e3, 1e6] as const;

/** Who lives within a distance of a site. */
export interface PeopleWithin {
  readonly radius: number;
  readonly settlements: number;
  readonly people: number;
  readonly withoutFigure: number;
  /** Null where spreading is switched off. */
  readonly spread: SpreadCount | null;
}

/** The nearest settlement of a size. */
export interface NearestSettlement {
  readonly people: number;
  /** By its place in the data; null where there is none. */
  readonly settlement: number | null;
  readonly distance: number;
  readonly azimuthDeg: number;
}

export interface Surroundings {
  readonly within: readonly PeopleWithin[];
  readonly nearest: readonly NearestSettlement[];
  readonly onLand: boolean;
  readonly coast: NearestCoast | null;
}

/** The index measures on a sphere of the mean radius; the ellipsoid differs by less than this share. */
const SPHERE_SHARE = 1.006;
const CIRCLE_POINTS = 180;

function settlementsWithin(
  settlements: Settlements,
  from: Place,
  radius: number,
): { at: number; distance: number }[] {
  const { longitudeDeg, latitudeDeg } = from;
  const km = (radius * SPHERE_SHARE) / 1000;
  return around(settlements.index, longitudeDeg, latitudeDeg, Infinity, km)
    .map((at) => ({ at, distance: between(from, settlements.place(at)).distance as number }))
    .filter(({ distance }) => distance <= radius);
}

function spreadWithin(
  world: World,
  from: Place,
  radius: number,
  inside: readonly number[],
  placeDensity: number,
): SpreadCount {
  const circle = Array.from({ length: CIRCLE_POINTS }, (_, step): [number, number] => {
    // Counterclockwise: the azimuth runs backwards.
    const { longitudeDeg, latitudeDeg } = destination(from, (-360 * step) / CIRCLE_POINTS, radius);
    return [longitudeDeg, latitudeDeg];
  });
  return world.spread(placeDensity).over(landInside(world.map, planarRings(circle)), inside);
}

/** How many of the sphere's nearest are measured on the ellipsoid before one of them is named. */
const CANDIDATES = 8;

function nearestOf(settlements: Settlements, from: Place, people: number): NearestSettlement {
  const { longitudeDeg, latitudeDeg } = from;
  const found = around(
    settlements.index,
    longitudeDeg,
    latitudeDeg,
    CANDIDATES,
    Infinity,
    (at) => settlements.people(at) >= people,
  )
    .map((at) => ({ people, settlement: at, ...between(from, settlements.place(at)) }))
    .sort((a, b) => a.distance - b.distance);
  return found[0] ?? { people, settlement: null, distance: Infinity, azimuthDeg: 0 };
}

/**
 * What surrounds a site: people within the distances of RADII, the nearest settlement of each size, the coast.
 * @param placeDensity people to the square metre within a settlement; null switches spreading off
 * @see tests/core/downrange/surroundings.test.ts
 */
export function surroundingsOf(world: World, from: Place, placeDensity: number | null): Surroundings {
  const { settlements } = world;
  const near = settlementsWithin(settlements, from, RADII[RADII.length - 1] as number);
  const within = RADII.map((radius): PeopleWithin => {
    const inside = near.filter(({ distance }) => distance <= radius).map(({ at }) => at);
    const spread = placeDensity === null ? null : spreadWithin(world, from, radius, inside, placeDensity);
    return { radius, settlements: inside.length, ...settlements.sum(inside), spread };
  });
  return {
    within,
    nearest: SIZES.map((people) => nearestOf(settlements, from, people)),
    onLand: isOnLand(world.map, from),
    coast: nearestCoast(world.map, from),
  };
}

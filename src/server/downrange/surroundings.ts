import {
  MOST_OTHER_SITES,
  MOST_PLACES,
  type NearPlace,
  type StudySurroundings,
} from '#contract/downrange.ts';
import { between, surroundingsOf, type Place, type World } from '#core/downrange/index.ts';
import { around } from 'geokdbush';
import type { DownrangeTask, OtherSite } from './tasks.ts';

const NEAR_KM = 100;

function nearPlace({ settlements }: World, from: Place, at: number): NearPlace {
  const place = settlements.place(at);
  const { distance, azimuthDeg } = between(from, place);
  return {
    name: settlements.data.names[at] ?? '',
    countryCode: settlements.countryCode(at),
    people: settlements.people(at),
    ...place,
    distanceKm: distance / 1000,
    azimuthDeg: (azimuthDeg + 360) % 360,
  };
}

function placesNear(world: World, from: Place): NearPlace[] {
  const { longitudeDeg, latitudeDeg } = from;
  // The index measures on a sphere: a little farther, then by the ellipsoid.
  return around(world.settlements.index, longitudeDeg, latitudeDeg, MOST_PLACES, NEAR_KM * 1.006)
    .map((at) => nearPlace(world, from, at))
    .filter(({ distanceKm }) => distanceKm <= NEAR_KM)
    .sort((a, b) => a.distanceKm - b.distanceKm);
}

function distancesTo(from: Place, others: readonly OtherSite[]): StudySurroundings['otherSites'] {
  return others
    .map(({ siteId, code, name, ...place }) => {
      const { distance, azimuthDeg } = between(from, place);
      return { siteId, code, name, distanceKm: distance / 1000, azimuthDeg: (azimuthDeg + 360) % 360 };
    })
    .sort((a, b) => a.distanceKm - b.distanceKm)
    .slice(0, MOST_OTHER_SITES);
}

type Answer = Omit<StudySurroundings, 'regulation' | 'cautions' | 'attributions'>;

/** Who lives about a site, its coast, and the study's other sites. @param placeDensity people to the square metre */
export function answerSurroundings(
  world: World,
  { siteId, start, others }: DownrangeTask & { kind: 'surroundings' },
  placeDensity: number | null,
): Answer {
  const found = surroundingsOf(world, start, placeDensity);
  return {
    siteId,
    within: found.within.map(({ radius, settlements, people, withoutFigure, spread }) => ({
      radiusKm: radius / 1000,
      settlements,
      settlementsWithoutFigure: withoutFigure,
      people,
      spreadPeople: spread && spread.people,
      unknownPeopleLandKm2: spread && spread.unknownLand / 1e6,
    })),
    nearest: found.nearest.map(({ people, settlement }) => ({
      leastPeople: people,
      place: settlement === null ? null : nearPlace(world, start, settlement),
    })),
    onLand: found.onLand,
    coast: found.coast && { distanceKm: found.coast.distance / 1000, ...found.coast.place },
    places: placesNear(world, start),
    otherSites: distancesTo(start, others),
  };
}

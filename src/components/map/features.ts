import type { Feature, FeatureCollection, LineString, Point, Position } from 'geojson';
import { formatNumber } from '#contract/format.ts';
import {
  TILE_LATITUDE_DEG,
  type LngLat,
  type MapFlight,
  type MapMoment,
  type MapSite,
  type MapTrack,
} from './types.ts';

export const onTiles = ({ latitudeDeg }: MapSite): boolean => Math.abs(latitudeDeg) <= TILE_LATITUDE_DEG;

const collect = <F extends Feature>(features: F[]): FeatureCollection => ({
  type: 'FeatureCollection',
  features,
});

/** Pads in the table's order, which is also the order in which they get a label. */
export function padFeatures(sites: readonly MapSite[]): FeatureCollection {
  return collect(
    sites.filter(onTiles).map(({ id, name, longitudeDeg, latitudeDeg }, order): Feature<Point> => ({
      type: 'Feature',
      properties: { id, name, order },
      geometry: { type: 'Point', coordinates: [longitudeDeg, latitudeDeg] },
    })),
  );
}

/** The runs of a line for which `keep` holds. */
function runs(line: readonly LngLat[], keep: (place: LngLat) => boolean): LngLat[][] {
  const parts: LngLat[][] = [[]];
  for (const place of line) {
    if (keep(place)) parts.at(-1)?.push(place);
    else if (parts.at(-1)?.length) parts.push([]);
  }
  return parts.filter((part) => part.length > 1);
}

export function trackFeatures(tracks: readonly MapTrack[], chosenId: string | null): FeatureCollection {
  return collect(
    tracks.flatMap(({ siteId, name, pieces }) =>
      pieces
        .flatMap((piece) => runs(piece, ([, latitude]) => Math.abs(latitude) <= TILE_LATITUDE_DEG))
        .map((coordinates): Feature<LineString> => ({
          type: 'Feature',
          properties: { name, chosen: siteId === chosenId },
          geometry: { type: 'LineString', coordinates: coordinates as Position[] },
        })),
    ),
  );
}

/** Flown ascents: the line over the ground, and the trace of impact points. */
export function flightFeatures(flights: readonly MapFlight[], chosenId: string | null): FeatureCollection {
  return collect(
    flights.flatMap(({ siteId, name, ground, impacts }) =>
      (
        [
          ['ground', ground],
          ['impacts', impacts],
        ] as const
      ).flatMap(([kind, line]) =>
        runs(line, ([, latitude]) => Math.abs(latitude) <= TILE_LATITUDE_DEG).map(
          (coordinates): Feature<LineString> => ({
            type: 'Feature',
            properties: { name, kind, chosen: siteId === chosenId },
            geometry: { type: 'LineString', coordinates: coordinates as Position[] },
          }),
        ),
      ),
    ),
  );
}

/** Where the vehicle is at a moment, and where it would come down. */
export function momentFeatures(moment: MapMoment | undefined): FeatureCollection {
  const places = [
    ['impact', moment?.impact],
    ['vehicle', moment?.vehicle],
  ] as const;
  return collect(
    places.flatMap(([kind, coordinates]): Feature<Point>[] =>
      coordinates
        ? [{ type: 'Feature', properties: { kind }, geometry: { type: 'Point', coordinates } }]
        : [],
    ),
  );
}

/** The parts of tracks that tiles can't hold, about the poles. */
export function polarPieces(tracks: readonly MapTrack[], chosenId: string | null) {
  return tracks.flatMap(({ siteId, pieces }) =>
    pieces
      .flatMap((piece) => runs(piece, ([, latitude]) => Math.abs(latitude) >= TILE_LATITUDE_DEG - 1))
      .map((line) => ({ line, chosen: siteId === chosenId })),
  );
}

/** Cross ticks of the chosen track alone: on all of them they would say nothing. */
export function tickFeatures(tracks: readonly MapTrack[], chosenId: string | null): FeatureCollection {
  const chosen = tracks.find(({ siteId }) => siteId === chosenId);
  return collect(
    (chosen?.ticks ?? []).map(({ place, distanceKm, headingDeg }): Feature<Point> => ({
      type: 'Feature',
      properties: { label: `${formatNumber(distanceKm)} km`, headingDeg },
      geometry: { type: 'Point', coordinates: place },
    })),
  );
}

import { groundTrack, type GroundTrackInput } from '#core/flight/ground-track.ts';
import { toDegrees, toKilometres } from '#core/units.ts';
import type { LngLat, MapTrack } from './types.ts';

type Place = Pick<GroundTrackInput, 'latitude' | 'longitude'>;
const lngLat = ({ latitude, longitude }: Place): LngLat => [toDegrees(longitude), toDegrees(latitude)];

/** A site's first orbit over the turning Earth, in degrees for the map. */
export function mapTrack(siteId: string, name: string, input: GroundTrackInput): MapTrack {
  const { pieces, ticks } = groundTrack(input);
  return {
    siteId,
    name,
    pieces: pieces.map((piece) => piece.map(lngLat)),
    ticks: ticks.map((tick) => ({
      place: lngLat(tick),
      distanceKm: toKilometres(tick.distance),
      headingDeg: toDegrees(tick.heading),
    })),
  };
}

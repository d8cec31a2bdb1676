import type { Feature, FeatureCollection, MultiLineString, Position } from 'geojson';
import { cutAtDateLine } from '#contract/date-line.ts';
import type { TrajectoryPoint } from '#contract/ascent.ts';
import type { AscentPair } from '#contract/study-ascents.ts';
import type { PooledDb } from '#db/client.ts';
import { fileHeaders, flownTrajectory, type FlownTrajectory } from './flown-trajectory.ts';

const CAUTION = 'Estimates for comparing sites, not flight data.';

const lines = (
  what: string,
  coordinates: Position[][],
  properties: Record<string, unknown>,
): Feature<MultiLineString> => ({
  type: 'Feature',
  geometry: { type: 'MultiLineString', coordinates },
  properties: { what, ...properties },
});

const flownPath = (points: readonly TrajectoryPoint[]): Position[] =>
  points.map(({ longitudeDeg, latitudeDeg, altitudeM }) => [longitudeDeg, latitudeDeg, altitudeM]);

const impactPath = (points: readonly TrajectoryPoint[]): Position[] =>
  points.flatMap(({ impact }) =>
    impact.kind === 'impact' ? [[impact.longitudeDeg, impact.latitudeDeg]] : [],
  );

function collectionOf({ site, orbit, ascent, points }: FlownTrajectory): FeatureCollection<MultiLineString> {
  const shared = {
    site: site.code,
    siteName: site.name,
    orbit: orbit.code,
    orbitName: orbit.name,
    figuresAreStale: ascent.figuresAreStale,
    flownAt: ascent.flownAt,
    inputsSha256: ascent.hash,
    caution: CAUTION,
  };
  const last = points.at(-1);
  return {
    type: 'FeatureCollection',
    features: [
      lines('trajectory', cutAtDateLine(flownPath(points)), {
        ...shared,
        payloadKg: ascent.figures?.payloadKg ?? null,
        burnOutS: last?.timeS ?? null,
      }),
      lines('impact-points', cutAtDateLine(impactPath(points)), shared),
    ],
  };
}

/**
 * One flown ascent as a GeoJSON FeatureCollection: the trajectory, with the height over the ellipsoid as third
 * coordinate, and the trace of its impact points. Both are cut where they cross the date line.
 * @see RFC 7946
 * @throws AppError 'not-found'
 */
export async function exportTrajectoryGeoJson(
  db: PooledDb,
  which: AscentPair & { studyId: string },
): Promise<Response> {
  const flown = await flownTrajectory(db, which);
  return new Response(JSON.stringify(collectionOf(flown)), {
    headers: fileHeaders(flown, { type: 'application/geo+json', extension: 'geojson' }),
  });
}

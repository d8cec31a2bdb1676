import type { FeatureCollection, Point } from 'geojson';
import type { Db } from '#db/client.ts';
import { listCriteria } from '#db/queries/criterion.ts';
import { listAllSites } from '#db/queries/upload.ts';

/**
 * A study's sites as a GeoJSON FeatureCollection of points, longitude first, with the height over the ellipsoid as
 * third coordinate; entered figures, and what is known of them, by criterion name.
 * @see RFC 7946
 */
export async function exportGeoJson(db: Db, { studyId }: { studyId: string }): Promise<Response> {
  const entered = (await listCriteria(db, { studyId })).filter(({ source }) => source !== 'computed');
  const sites = await listAllSites(db, { studyId });
  const collection: FeatureCollection<Point> = {
    type: 'FeatureCollection',
    features: sites.map(({ id, code, name, latitudeDeg, longitudeDeg, elevationM, ...site }) => ({
      type: 'Feature',
      id,
      geometry: { type: 'Point', coordinates: [longitudeDeg, latitudeDeg, elevationM] },
      properties: {
        code,
        name,
        elevationM,
        permittedAzimuthsDeg: site.permittedAzimuthsDeg,
        notes: site.notes,
        values: byName(entered, site.values),
        particulars: byName(entered, site.particulars),
      },
    })),
  };
  return new Response(JSON.stringify(collection), {
    headers: {
      'content-type': 'application/geo+json',
      'content-disposition': 'attachment; filename="sites.geojson"',
      'cache-control': 'private, no-store',
    },
  });
}

function byName<T>(
  criteria: readonly { id: string; name: string }[],
  byId: Readonly<Record<string, T>>,
): Record<string, T> {
  return Object.fromEntries(
    criteria.flatMap(({ id, name }) => {
      const value = byId[id];
      return value === undefined ? [] : [[name, value] as const];
    }),
  );
}

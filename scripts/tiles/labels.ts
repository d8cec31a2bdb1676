import { geoArea, geoCentroid, geoContains } from 'd3-geo';
import type { Feature, MultiPolygon, Point, Polygon } from 'geojson';
import { seas } from './seas.ts';

/** A label's feature: its words, and the zoom from which the map draws it. */
export type Label = Feature<Point, { name: string; zoom: number }>;

const point = (name: string, coordinates: [number, number], zoom: number): Label => ({
  type: 'Feature',
  properties: { name, zoom },
  geometry: { type: 'Point', coordinates },
});

/** Zooms at which lands of at least so many steradians get their name. */
const landSteps = [0.15, 0.03, 0.007, 0.0015, 0.0002];

/** The largest of a country's polygons: a name belongs on the mainland, not between the islands. */
function mainland(shape: Polygon | MultiPolygon): Polygon {
  const all = shape.type === 'Polygon' ? [shape.coordinates] : shape.coordinates;
  const polygons = all.map((coordinates): Polygon => ({ type: 'Polygon', coordinates }));
  return polygons.reduce((best, next) => (geoArea(next) > geoArea(best) ? next : best));
}

/** A point inside the polygon: the centroid, or the place nearest to it on a coarse net (a crescent's is outside). */
function inside(polygon: Polygon): [number, number] {
  const centre = geoCentroid(polygon);
  if (geoContains(polygon, centre)) return centre;
  const ring = polygon.coordinates[0] ?? [];
  const offsets = [0.25, 0.5, 0.75].flatMap((share) =>
    ring.map(([x = 0, y = 0]): [number, number] => [
      x + (centre[0] - x) * share,
      y + (centre[1] - y) * share,
    ]),
  );
  return offsets.find((candidate) => geoContains(polygon, candidate)) ?? centre;
}

export function countryLabels(
  countries: readonly Feature<Polygon | MultiPolygon, { name: string }>[],
): Label[] {
  return countries.map(({ geometry, properties }) => {
    const land = mainland(geometry);
    const area = geoArea(land);
    const step = landSteps.findIndex((least) => area >= least);
    return point(properties.name, inside(land), (step < 0 ? landSteps.length : step) + 1);
  });
}

export function seaLabels(): Label[] {
  return seas.map(([name, longitude, latitude, zoom]) => point(name, [longitude, latitude], zoom));
}

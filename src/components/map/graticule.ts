import type { Feature, FeatureCollection, LineString, Position } from 'geojson';

const line = (coordinates: Position[], ten: boolean): Feature<LineString, { ten: boolean }> => ({
  type: 'Feature',
  properties: { ten },
  geometry: { type: 'LineString', coordinates },
});

const range = (from: number, to: number): number[] =>
  Array.from({ length: to - from + 1 }, (_, index) => from + index);

/** Meridians and parallels of every whole degree; `ten` marks those of every tenth, drawn at all zooms. */
export function graticule(): FeatureCollection<LineString, { ten: boolean }> {
  const meridians = range(-180, 179).map((longitude) =>
    line(
      [-85, 0, 85].map((latitude) => [longitude, latitude]),
      longitude % 10 === 0,
    ),
  );
  const parallels = range(-85, 85).map((latitude) =>
    line(
      range(-6, 6).map((step) => [step * 30, latitude]),
      latitude % 10 === 0,
    ),
  );
  return { type: 'FeatureCollection', features: [...meridians, ...parallels] };
}

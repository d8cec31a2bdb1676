import { geoEquirectangular } from 'd3-geo';
import { geoProject } from 'd3-geo-projection';
import type { Feature, LineString, MultiPolygon, Polygon, Position } from 'geojson';

/**
 * The atlas draws its rings on the sphere: they run across ±180° and Antarctica has no edge at the pole. Tiles
 * are planar, so what crosses has to be cut first, or it smears over the whole map.
 */
const plate = geoEquirectangular()
  .scale(180 / Math.PI)
  .translate([0, 0])
  .reflectY(true)
  .precision(0);

const jumps = (a: Position, b: Position): boolean => Math.abs((a[0] ?? 0) - (b[0] ?? 0)) > 180;

function crossesDateLine(ring: Position[]): boolean {
  return ring.some((point, index) => {
    const before = ring[index - 1];
    return before !== undefined && jumps(before, point);
  });
}

/**
 * Each polygon by itself, cut at ±180° where it crosses. Only those: a tiny ring wound the wrong way would be
 * taken by the spherical cutter for the whole world with a hole in it.
 */
export function cutPolygons(shapes: readonly (Polygon | MultiPolygon)[]): Feature<Polygon | MultiPolygon>[] {
  return shapes.flatMap((shape) => {
    const polygons = shape.type === 'Polygon' ? [shape.coordinates] : shape.coordinates;
    return polygons.map((coordinates) => {
      const polygon: Polygon = { type: 'Polygon', coordinates };
      const geometry = coordinates.some(crossesDateLine) ? geoProject(polygon, plate) : polygon;
      return { type: 'Feature', properties: {}, geometry } as const;
    });
  });
}

/** A segment that is only the cut itself: along ±180°, along the south pole, or from one edge to the other. */
function isSeam(a: Position, b: Position): boolean {
  const alongEdge = Math.abs(a[0] ?? 0) > 179.99 && Math.abs(b[0] ?? 0) > 179.99;
  const alongPole = (a[1] ?? 0) < -89.9 && (b[1] ?? 0) < -89.9;
  return alongEdge || alongPole || jumps(a, b);
}

/** The lines with their seams taken out, broken in two where one was. */
export function openLines(lines: readonly Position[][]): Feature<LineString>[] {
  const pieces = lines.flatMap((line) => {
    const parts: Position[][] = [[]];
    line.forEach((point, index) => {
      const before = line[index - 1];
      if (before && isSeam(before, point)) parts.push([]);
      parts.at(-1)?.push(point);
    });
    return parts.filter((part) => part.length > 1);
  });
  return pieces.map((coordinates) => ({
    type: 'Feature',
    properties: {},
    geometry: { type: 'LineString', coordinates },
  }));
}

import { geoEquirectangular, geoStream } from 'd3-geo';
import type { LineString, Polygon } from 'geojson';
import type { Position } from './corridor.ts';

/** Plane degrees: what GeoJSON means by a straight line between two positions (RFC 7946, section 3.1.1). */
const plate = geoEquirectangular()
  .scale(180 / Math.PI)
  .translate([0, 0])
  .reflectY(true)
  .precision(0);

const crossesDateLine = (ring: readonly Position[]): boolean =>
  ring.some(([longitude], at) => Math.abs(longitude - (ring.at(at - 1)?.[0] ?? longitude)) > 180);

/** Twice the signed area in the plane of degrees; positive counterclockwise. */
function turning(ring: readonly Position[]): number {
  return ring.reduce((sum, [x1, y1], at) => {
    const [x0, y0] = ring.at(at - 1) as Position;
    return sum + (x0 * y1 - x1 * y0);
  }, 0);
}

/** The pieces of a shape cut at the date line by the sphere's own clipping. */
function cut(shape: Polygon | LineString): Position[][] {
  const pieces: Position[][] = [];
  const sink = {
    point: (x: number, y: number) => pieces.at(-1)?.push([x, y]),
    lineStart: () => pieces.push([]),
    lineEnd: () => undefined,
    polygonStart: () => undefined,
    polygonEnd: () => undefined,
    sphere: () => undefined,
  };
  geoStream(shape, plate.stream(sink));
  return pieces;
}

function cutRing(ring: readonly Position[]): Position[][] {
  // The library takes what lies to the right of a ring for its inside.
  const clockwise = [...ring].reverse();
  return cut({ type: 'Polygon', coordinates: [[...clockwise, clockwise[0] as Position]] });
}

/**
 * A ring on the Earth as rings in the plane of degrees, each counterclockwise and within −180…180: cut at the date
 * line, and led along the edge of the plane where it goes round a pole.
 * @param ring counterclockwise seen from above; the first position not repeated
 */
export function planarRings(ring: readonly Position[]): Position[][] {
  const rings = crossesDateLine(ring) ? cutRing(ring) : [[...ring]];
  return rings.map((one) => (turning(one) < 0 ? [...one].reverse() : one));
}

/** A line on the Earth as lines in the plane of degrees, cut at the date line. */
export const planarLines = (line: readonly Position[]): Position[][] =>
  cut({ type: 'LineString', coordinates: [...line] });

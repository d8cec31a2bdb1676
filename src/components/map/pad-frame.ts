import type { Map, Point } from 'maplibre-gl';

/** Where a place lies on the screen and how north and east run there: unit steps in px, shorter where foreshortened. */
export interface PadFrame {
  readonly x: number;
  readonly y: number;
  readonly east: readonly [number, number];
  readonly north: readonly [number, number];
}

const flatEast = [1, 0] as const;
const flatNorth = [0, -1] as const;
const stepDeg = 0.2;

interface Place {
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
}

/** Chord of about 1° on the unit sphere. */
const sameChord = 0.02;

function onSphere(longitudeDeg: number, latitudeDeg: number): [number, number, number] {
  const [lambda, phi] = [(longitudeDeg * Math.PI) / 180, (latitudeDeg * Math.PI) / 180];
  return [Math.cos(phi) * Math.cos(lambda), Math.cos(phi) * Math.sin(lambda), Math.sin(phi)];
}

/** Behind the globe: what is seen at the place's point of the screen is another place. */
function isHidden(map: Map, { latitudeDeg, longitudeDeg }: Place, at: Point): boolean {
  const { lng, lat } = map.unproject(at);
  const seen = onSphere(lng, lat);
  const chord = Math.hypot(
    ...onSphere(longitudeDeg, latitudeDeg).map((value, axis) => value - (seen[axis] ?? 0)),
  );
  return chord > sameChord;
}

function onGlobe(map: Map, place: Place): PadFrame | undefined {
  const { latitudeDeg, longitudeDeg } = place;
  const at = map.project([longitudeDeg, latitudeDeg]);
  if (isHidden(map, place, at)) return undefined;
  // At a pole a step in longitude goes nowhere: take the axes just beside it.
  const latitude = Math.max(-89.5, Math.min(89.5, latitudeDeg));
  const here = map.project([longitudeDeg, latitude]);
  const up = map.project([longitudeDeg, latitude + stepDeg]);
  const right = map.project([longitudeDeg + stepDeg / Math.cos((latitude * Math.PI) / 180), latitude]);
  const north = [up.x - here.x, up.y - here.y] as const;
  const east = [right.x - here.x, right.y - here.y] as const;
  const size = Math.max(Math.hypot(...north), Math.hypot(...east));
  if (size === 0) return undefined;
  return {
    x: at.x,
    y: at.y,
    east: [east[0] / size, east[1] / size],
    north: [north[0] / size, north[1] / size],
  };
}

/**
 * The frame at a place; undefined where the globe hides it. On the flat map north is up: it is conformal and
 * never turned, so azimuths are true there.
 */
export function padFrame(map: Map, place: Place, globe: boolean): PadFrame | undefined {
  if (globe) return onGlobe(map, place);
  // The nearest of the world's copies to the middle of the view.
  const turns = Math.round((map.getCenter().lng - place.longitudeDeg) / 360);
  const { x, y } = map.project([place.longitudeDeg + 360 * turns, place.latitudeDeg]);
  return { x, y, east: flatEast, north: flatNorth };
}

/** The point at a distance (px, as seen without foreshortening) along an azimuth. */
export function along(frame: PadFrame, azimuthDeg: number, distance: number): [x: number, y: number] {
  const angle = (azimuthDeg * Math.PI) / 180;
  const e = Math.sin(angle) * distance;
  const n = Math.cos(angle) * distance;
  return [frame.x + e * frame.east[0] + n * frame.north[0], frame.y + e * frame.east[1] + n * frame.north[1]];
}

/** The azimuth, 0…360, of a point of the screen as seen from the place. */
export function azimuthTo({ x, y, east, north }: PadFrame, at: { x: number; y: number }): number {
  const [dx, dy] = [at.x - x, at.y - y];
  const determinant = east[0] * north[1] - east[1] * north[0];
  const e = (dx * north[1] - dy * north[0]) / determinant;
  const n = (dy * east[0] - dx * east[1]) / determinant;
  return ((Math.atan2(e, n) * 180) / Math.PI + 360) % 360;
}

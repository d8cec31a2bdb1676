import type { Corridor } from './corridor.ts';
import type { Place } from './geodesic.ts';
import { halfWidthAt } from './shape.ts';
import type { Shape } from './shape.ts';
import { directionOf } from './strip.ts';

/** A frame in plane degrees; it does not cross the date line. */
export interface Frame {
  readonly west: number;
  readonly south: number;
  readonly east: number;
  readonly north: number;
}

/** A corridor is framed slice by slice, so that a slanting one takes in little beside itself. */
const SLICE = 600_000;
/** Between points of a slice's edge at most 550 km apart a geodesic bulges less than 6 km, 0.06° of latitude. */
const PAD_DEG = 0.1;
const ACROSS = 6;
/** Nearer to a pole than this a frame goes all the way round. */
const POLAR_DEG = 84;

function edgeOf({ shape, strip }: Corridor, from: number, to: number): Place[] {
  const places: Place[] = [];
  const corners = shape.corners.map(([s]) => s).filter((s) => s > from && s < to);
  for (const s of [from, ...corners, (from + to) / 2, to]) {
    const half = widestNear(shape, s);
    for (let step = 0; step <= ACROSS; step += 1)
      places.push(strip.path.beside(s, half * ((2 * step) / ACROSS - 1)));
  }
  return places;
}

/** The half-width, behind the launch point that of the whole circle. */
const widestNear = (shape: Shape, s: number): number => halfWidthAt(shape, Math.max(0, s));

const wrap = (degrees: number): number => degrees - 360 * Math.floor((degrees + 180) / 360);

function holdsPole({ strip, shape }: Corridor, from: number, to: number, latitudeDeg: 90 | -90): boolean {
  const { s, y } = strip.rough(directionOf({ latitudeDeg, longitudeDeg: 0 }));
  const near = 100_000;
  return (
    s > from - near && s < to + near && Math.abs(y) < widestNear(shape, Math.min(to, shape.range)) + near
  );
}

function frameSlice(corridor: Corridor, from: number, to: number): Frame[] {
  const places = edgeOf(corridor, from, to);
  const latitudes = places.map(({ latitudeDeg }) => latitudeDeg);
  const [southPole, northPole] = [holdsPole(corridor, from, to, -90), holdsPole(corridor, from, to, 90)];
  const south = southPole ? -90 : Math.max(-90, Math.min(...latitudes) - PAD_DEG);
  const north = northPole ? 90 : Math.min(90, Math.max(...latitudes) + PAD_DEG);
  if (southPole || northPole || north > POLAR_DEG || south < -POLAR_DEG)
    return [{ west: -180, south, east: 180, north }];
  const middle = corridor.strip.path.at((from + to) / 2).longitudeDeg;
  const offsets = places.map(({ longitudeDeg }) => wrap(longitudeDeg - middle));
  const pad = PAD_DEG / Math.cos((Math.max(Math.abs(north), Math.abs(south)) * Math.PI) / 180);
  const west = middle + Math.min(...offsets) - pad;
  const east = middle + Math.max(...offsets) + pad;
  if (west < -180)
    return [
      { west: west + 360, south, east: 180, north },
      { west: -180, south, east, north },
    ];
  if (east > 180)
    return [
      { west, south, east: 180, north },
      { west: -180, south, east: east - 360, north },
    ];
  return [{ west, south, east, north }];
}

/** Frames that together hold the whole corridor. */
export function framesOf(corridor: Corridor): Frame[] {
  const { circleRadius, range } = corridor.shape;
  const length = range + circleRadius;
  const slices = Math.ceil(length / SLICE);
  return Array.from({ length: slices }, (_, at) =>
    frameSlice(
      corridor,
      -circleRadius + (at * length) / slices,
      -circleRadius + ((at + 1) * length) / slices,
    ),
  ).flat();
}

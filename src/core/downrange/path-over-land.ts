import { CELL_DEG, UNITS_PER_DEG, cellAt } from './data/cells.ts';
import type { LandPiece } from './data/land-data.ts';
import type { GeodesicPath, Place } from './geodesic.ts';
import { SEA } from './land-map.ts';
import type { LandMap } from './land-map.ts';

/** A stretch of a path over one country's land; distances along the path, m. */
export interface Stretch {
  readonly from: number;
  readonly to: number;
  readonly country: number;
}

/** A chord of this length in the plane of degrees strays from the geodesic by less than 8 m × tan φ. */
const STEP = 20_000;

/** A piece of path in plane degrees, its end brought within half a turn of its start. */
interface Chord {
  readonly x: number;
  readonly y: number;
  readonly dx: number;
  readonly dy: number;
}

/**
 * A chord is laid 1 cm north-east of its place: cells and rings meet at whole units, and a path along a meridian or a
 * parallel would run in the seam between two cells, belonging to neither.
 */
const ASIDE_DEG = 1e-7;

function chordOf(from: Place, to: Place): Chord {
  const turn = to.longitudeDeg - from.longitudeDeg;
  const dx = turn > 180 ? turn - 360 : turn < -180 ? turn + 360 : turn;
  const [x, y] = [from.longitudeDeg + ASIDE_DEG, from.latitudeDeg + ASIDE_DEG];
  return { x, y, dx, dy: to.latitudeDeg - from.latitudeDeg };
}

const wrap = (degrees: number): number => degrees - 360 * Math.floor((degrees + 180) / 360);

/** Shares of the chord at which it passes from cell to cell. */
function cellCrossings({ x, y, dx, dy }: Chord): number[] {
  const along = (start: number, step: number): number[] => {
    if (step === 0) return [];
    const [low, high] = step > 0 ? [start, start + step] : [start + step, start];
    const first = Math.floor(low / CELL_DEG) + 1;
    const count = Math.max(0, Math.ceil(high / CELL_DEG) - first);
    return Array.from({ length: count }, (_, line) => ((first + line) * CELL_DEG - start) / step);
  };
  return [0, ...along(x, dx), ...along(y, dy), 1].sort((a, b) => a - b);
}

/** Shares of the chord at which it crosses the rings of a piece, its longitude shifted into the piece's frame. */
function ringCrossings(chord: Chord, shift: number, { rings, whole }: LandPiece, into: number[]): void {
  if (whole) return;
  const [x, y] = [(chord.x + shift) * UNITS_PER_DEG, chord.y * UNITS_PER_DEG];
  const [dx, dy] = [chord.dx * UNITS_PER_DEG, chord.dy * UNITS_PER_DEG];
  for (const ring of rings) {
    let [x0, y0] = [ring[ring.length - 2] as number, ring[ring.length - 1] as number];
    let side0 = dx * (y0 - y) - dy * (x0 - x);
    for (let at = 0; at < ring.length; at += 2) {
      const [x1, y1] = [ring[at] as number, ring[at + 1] as number];
      const side1 = dx * (y1 - y) - dy * (x1 - x);
      if (side0 > 0 !== side1 > 0) {
        const share = side0 / (side0 - side1);
        const [cx, cy] = [x0 + share * (x1 - x0) - x, y0 + share * (y1 - y0) - y];
        into.push(Math.abs(dx) > Math.abs(dy) ? cx / dx : cy / dy);
      }
      [x0, y0, side0] = [x1, y1, side1];
    }
  }
}

/** Yields the chord's parts, each with the country under it or SEA, by share of the chord. */
function* partsOf(map: LandMap, chord: Chord): Generator<{ from: number; to: number; country: number }> {
  const borders = cellCrossings(chord);
  for (let at = 1; at < borders.length; at += 1) {
    const [from, to] = [borders[at - 1] as number, borders[at] as number];
    if (to <= from) continue;
    const middle = (from + to) / 2;
    const longitude = chord.x + middle * chord.dx;
    const pieces = map.pieces(cellAt(chord.y + middle * chord.dy, longitude));
    if (pieces.length === 0) {
      yield { from, to, country: SEA };
      continue;
    }
    const cuts = [from, to];
    for (const piece of pieces) ringCrossings(chord, wrap(longitude) - longitude, piece, cuts);
    const inside = cuts.filter((share) => share >= from && share <= to).sort((a, b) => a - b);
    for (let cut = 1; cut < inside.length; cut += 1) {
      const [start, end] = [inside[cut - 1] as number, inside[cut] as number];
      if (end - start < 1e-9) continue;
      const share = (start + end) / 2;
      const place = {
        latitudeDeg: chord.y + share * chord.dy,
        longitudeDeg: wrap(chord.x + share * chord.dx),
      };
      yield { from: start, to: end, country: map.countryAt(place) };
    }
  }
}

/**
 * The stretches of a path that lie over land, in the order flown, parts of one country joined.
 * @param range how far along the path to look, m
 * @see tests/core/downrange/path-over-land.test.ts
 */
export function* landAlong(map: LandMap, path: GeodesicPath, range: number): Generator<Stretch> {
  let open: { from: number; to: number; country: number } | undefined;
  let from: Place = path.start;
  for (let s = 0; s < range; s += STEP) {
    const length = Math.min(STEP, range - s);
    const to = path.at(s + length);
    for (const part of partsOf(map, chordOf(from, to))) {
      const [start, end] = [s + part.from * length, s + part.to * length];
      if (open && (part.country !== open.country || start - open.to > 1)) {
        yield open;
        open = undefined;
      }
      if (part.country === SEA) continue;
      if (open) open.to = end;
      else open = { from: start, to: end, country: part.country };
    }
    from = to;
  }
  if (open) yield open;
}

/** What a flight line meets: where it leaves the launch point's own land, and the first land after that. */
export interface FirstLand {
  /** Length over the launch point's own land before open water, m; null where the line never leaves land. */
  readonly coast: number | null;
  /** The first land after that; null where there is none as far as was looked. */
  readonly land: { readonly distance: number; readonly country: number } | null;
}

/**
 * The coast and the first land along a path.
 * @param nearby land that begins within this distance is the launch point's own: the coast is drawn to some 400 m
 */
export function firstLand(map: LandMap, path: GeodesicPath, range: number, nearby: number): FirstLand {
  let coast = 0;
  for (const { from, to, country } of landAlong(map, path, range)) {
    if (from > Math.max(nearby, coast + 1)) return { coast, land: { distance: from, country } };
    coast = to;
  }
  return { coast: coast >= range - 1 ? null : coast, land: null };
}

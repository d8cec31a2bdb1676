import { FillRule, intersect, rectClip } from 'clipper2-ts';
import type { Path64, Paths64 } from 'clipper2-ts';
import { ringArea } from './area.ts';
import type { Position } from './corridor.ts';
import { CELL_DEG, CELL_UNITS, COLUMNS, ROWS, UNITS_PER_DEG, cornerOf } from './data/cells.ts';
import type { LandPiece } from './data/land-data.ts';
import type { LandMap } from './land-map.ts';

/** Land of one country inside an area. */
export interface CountryLand {
  readonly country: number;
  /** m². */
  readonly area: number;
}

const toPath = (ring: readonly Position[]): Path64 =>
  ring.map(([x, y]) => ({ x: Math.round(x * UNITS_PER_DEG), y: Math.round(y * UNITS_PER_DEG) }));

const ofPiece = ({ rings }: LandPiece): Paths64 =>
  rings.map((ring) =>
    Array.from({ length: ring.length / 2 }, (_, at) => ({
      x: ring[2 * at] as number,
      y: ring[2 * at + 1] as number,
    })),
  );

const areaOfPaths = (paths: Paths64): number =>
  paths.reduce((sum, path) => sum + ringArea(path.flatMap(({ x, y }) => [x, y])), 0);

/** A run of cells: from a corner, so many columns and rows. The library's rectangle has its top at the lesser y. */
function clipTo(area: Paths64, cell: number, columns: number): Paths64 {
  const [left, top] = cornerOf(cell);
  return rectClip({ left, top, right: left + columns * CELL_UNITS, bottom: top + CELL_UNITS }, area);
}

/** Whether the part of an area within a cell is the whole cell. */
function fillsCell(paths: Paths64, cell: number): boolean {
  const [left, bottom] = cornerOf(cell);
  const isCorner = ({ x, y }: Path64[number]): boolean =>
    (x === left || x === left + CELL_UNITS) && (y === bottom || y === bottom + CELL_UNITS);
  const [path] = paths;
  return paths.length === 1 && path?.length === 4 && path.every(isCorner);
}

/** Cells from the one that holds the least figure to the one that holds the greatest. */
function span(values: readonly number[], origin: number, most: number): { first: number; count: number } {
  const first = Math.floor((Math.min(...values) - origin) / CELL_DEG);
  const last = Math.min(most - 1, Math.floor((Math.max(...values) - origin) / CELL_DEG));
  return { first, count: last - first + 1 };
}

const numbers = ({ first, count }: { first: number; count: number }): number[] =>
  Array.from({ length: count }, (_, step) => first + step);

/** Yields the parts of an area by the cells they lie in, those with land alone; rows first, so that rings get short. */
function* partsByCell(map: LandMap, ring: readonly Position[]): Generator<{ cell: number; paths: Paths64 }> {
  const area = [toPath(ring)];
  const longitudes = ring.map(([x]) => x);
  const latitudes = ring.map(([, y]) => y);
  const columns = span(longitudes, -180, COLUMNS);
  for (const row of numbers(span(latitudes, -90, ROWS))) {
    const band = clipTo(area, row * COLUMNS + columns.first, columns.count);
    for (const column of numbers(columns)) {
      const cell = row * COLUMNS + column;
      if (map.pieces(cell).length === 0) continue;
      const paths = clipTo(band, cell, 1);
      if (paths.length > 0) yield { cell, paths };
    }
  }
}

/**
 * The land inside an area, country by country, each piece cut at the area's edge in the plane of degrees.
 * @param rings of the area, counterclockwise, within −180…180, none inside another
 * @returns countries with land there, most first
 * @see tests/core/downrange/land-inside.test.ts
 */
export function landInside(map: LandMap, rings: readonly (readonly Position[])[]): CountryLand[] {
  const found = new Map<number, number>();
  for (const { cell, paths } of rings.flatMap((ring) => [...partsByCell(map, ring)])) {
    const fills = fillsCell(paths, cell);
    for (const piece of map.pieces(cell)) {
      const inside = (): number =>
        areaOfPaths(piece.whole ? paths : intersect(ofPiece(piece), paths, FillRule.EvenOdd));
      const area = fills ? map.areaOf(piece) : inside();
      if (area > 0) found.set(piece.country, (found.get(piece.country) ?? 0) + area);
    }
  }
  return [...found]
    .map(([country, area]) => ({ country, area }))
    .sort((a, b) => b.area - a.area || a.country - b.country);
}

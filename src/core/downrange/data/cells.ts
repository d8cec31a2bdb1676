/**
 * The net that land is cut by: cells of 2° × 2°, numbered eastward from 180° W and, row by row, northward from the
 * South Pole. Positions inside are whole numbers of 0.0001° (11 m), finer than the atlas itself.
 */
export const CELL_DEG = 2;
export const COLUMNS = 360 / CELL_DEG;
export const ROWS = 180 / CELL_DEG;
export const UNITS_PER_DEG = 10_000;
export const CELL_UNITS = CELL_DEG * UNITS_PER_DEG;

/** The south-west corner of a cell, in units: longitude, latitude. */
export function cornerOf(cell: number): readonly [number, number] {
  const column = cell % COLUMNS;
  const row = (cell - column) / COLUMNS;
  return [column * CELL_UNITS - 180 * UNITS_PER_DEG, row * CELL_UNITS - 90 * UNITS_PER_DEG];
}

/** The cell that holds a place; its longitude −180…180, its latitude −90…90, in degrees. */
export function cellAt(latitudeDeg: number, longitudeDeg: number): number {
  const column = Math.floor((longitudeDeg + 180) / CELL_DEG);
  const row = Math.floor((latitudeDeg + 90) / CELL_DEG);
  return Math.min(row, ROWS - 1) * COLUMNS + (((column % COLUMNS) + COLUMNS) % COLUMNS);
}

/** The whole cell as a ring, counterclockwise from its south-west corner, in units. */
export function cellRing(cell: number): Int32Array {
  const [west, south] = cornerOf(cell);
  const [east, north] = [west + CELL_UNITS, south + CELL_UNITS];
  return Int32Array.of(west, south, east, south, east, north, west, north);
}

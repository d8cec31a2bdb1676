import type { Position } from './near.ts';
import { warning, type Reason } from './reasons.ts';
import type { SiteReading } from './row.ts';

export const SWAPPED: Reason = warning('swapped', 'latitudeDeg', 'Latitude and longitude look swapped.');

const CELL_DEG = 5;
const CELLS_ROUND = 360 / CELL_DEG;

/**
 * Whether a row's coordinates are refused in a way that exchanging them would cure: a latitude beyond ±90 beside a
 * longitude within it, or E/W in the latitude beside N/S in the longitude.
 */
export function refusedAsSwapped(site: SiteReading, reasons: readonly Reason[]): boolean {
  const letters = reasons.filter((reason) => reason.code === 'hemisphere').map((reason) => reason.field);
  if (letters.includes('latitudeDeg') && letters.includes('longitudeDeg')) return true;
  if (site.latitudeDeg === null || site.longitudeDeg === null) return false;
  return beyond(site.latitudeDeg) && Math.abs(site.longitudeDeg) <= 90;
}

/**
 * Whether a whole file's columns look exchanged: several latitudes beyond ±90, a fifth of them or more, and no
 * longitude beyond it.
 */
export function columnsLookSwapped(sites: readonly SiteReading[]): boolean {
  const latitudes = sites.map((site) => site.latitudeDeg).filter((degrees) => degrees !== null);
  const over = latitudes.filter(beyond).length;
  const wide = sites.some((site) => site.longitudeDeg !== null && Math.abs(site.longitudeDeg) > 90);
  return over >= 2 && over >= latitudes.length / 5 && !wide;
}

/**
 * Where sites lie, in cells of 5°: finds a position that lies far from every other site while the same figures
 * exchanged lie beside one.
 */
export class Neighbourhoods {
  readonly #count = new Map<number, number>();

  add(position: Position): void {
    const key = keyOf(...cellOf(position));
    this.#count.set(key, (this.#count.get(key) ?? 0) + 1);
  }

  /** @param position one that was itself added */
  looksSwapped(position: Position): boolean {
    const exchanged = { latitudeDeg: position.longitudeDeg, longitudeDeg: position.latitudeDeg };
    if (Math.abs(exchanged.latitudeDeg) > 90) return false;
    return this.#countAround(position, 2) === 1 && this.#countAround(exchanged, 1, position) > 0;
  }

  #countAround(position: Position, reach: number, without?: Position): number {
    const [row, column] = cellOf(position);
    let count = 0;
    for (let r = row - reach; r <= row + reach; r += 1) {
      for (let c = column - reach; c <= column + reach; c += 1) count += this.#count.get(keyOf(r, c)) ?? 0;
    }
    if (without === undefined) return count;
    const [ownRow, ownColumn] = cellOf(without);
    const across = Math.abs(ownColumn - column);
    const inside = Math.abs(ownRow - row) <= reach && Math.min(across, CELLS_ROUND - across) <= reach;
    return inside ? count - 1 : count;
  }
}

function beyond(degrees: number): boolean {
  return Math.abs(degrees) > 90 && Math.abs(degrees) <= 180;
}

function cellOf({ latitudeDeg, longitudeDeg }: Position): [number, number] {
  return [Math.floor(latitudeDeg / CELL_DEG), Math.floor(longitudeDeg / CELL_DEG)];
}

function keyOf(row: number, column: number): number {
  return row * 1000 + (((column % CELLS_ROUND) + CELLS_ROUND) % CELLS_ROUND);
}

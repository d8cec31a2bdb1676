import type { Position } from './near.ts';
import { warning, type Reason } from './reasons.ts';
import type { SiteReading } from './row.ts';

export const SWAPPED: Reason = warning('swapped', 'latitudeDeg', 'Latitude and longitude look swapped.');

/** Cells that tell what is near: "far from all" is some 10°, "beside one" at most 2°. */
const COARSE_DEG = 5;
const FINE_DEG = 1;

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

/** Where sites lie: finds a position far from every other site whose figures, exchanged, lie beside one. */
export class Neighbourhoods {
  readonly #coarse = new Cells(COARSE_DEG);
  readonly #fine = new Cells(FINE_DEG);

  add(position: Position): void {
    this.#coarse.add(position);
    this.#fine.add(position);
  }

  /** @param position one that was itself added */
  looksSwapped(position: Position): boolean {
    const exchanged = { latitudeDeg: position.longitudeDeg, longitudeDeg: position.latitudeDeg };
    if (Math.abs(exchanged.latitudeDeg) > 90 || this.#coarse.countAround(position, 2) > 1) return false;
    return this.#fine.countAround(exchanged, 1) > (this.#fine.isAround(exchanged, 1, position) ? 1 : 0);
  }
}

/** Counts positions by cells of latitude and longitude that close round the Earth. */
class Cells {
  readonly #count = new Map<number, number>();
  readonly #round: number;

  constructor(readonly sizeDeg: number) {
    this.#round = 360 / sizeDeg;
  }

  add(position: Position): void {
    const key = this.#keyOf(...this.#cellOf(position));
    this.#count.set(key, (this.#count.get(key) ?? 0) + 1);
  }

  /** How many positions lie in the cells up to `reach` away. */
  countAround(position: Position, reach: number): number {
    const [row, column] = this.#cellOf(position);
    let count = 0;
    for (let r = row - reach; r <= row + reach; r += 1) {
      for (let c = column - reach; c <= column + reach; c += 1)
        count += this.#count.get(this.#keyOf(r, c)) ?? 0;
    }
    return count;
  }

  /** Whether `other` lies in the cells that countAround counts. */
  isAround(position: Position, reach: number, other: Position): boolean {
    const [row, column] = this.#cellOf(position);
    const [otherRow, otherColumn] = this.#cellOf(other);
    const across = Math.abs(otherColumn - column) % this.#round;
    return Math.abs(otherRow - row) <= reach && Math.min(across, this.#round - across) <= reach;
  }

  #cellOf({ latitudeDeg, longitudeDeg }: Position): [number, number] {
    return [Math.floor(latitudeDeg / this.sizeDeg), Math.floor(longitudeDeg / this.sizeDeg)];
  }

  #keyOf(row: number, column: number): number {
    return row * 1000 + (((column % this.#round) + this.#round) % this.#round);
  }
}

function beyond(degrees: number): boolean {
  return Math.abs(degrees) > 90 && Math.abs(degrees) <= 180;
}

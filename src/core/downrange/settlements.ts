import KDBush from 'kdbush';
import { containsPlace, isExcluded } from './corridor.ts';
import type { Corridor } from './corridor.ts';
import type { SettlementData } from './data/settlement-data.ts';
import type { Place } from './geodesic.ts';
import { framesOf } from './frames.ts';
import { directionOf } from './strip.ts';
import type { Vector } from './strip.ts';

/** The settlements with an index of their places. A settlement is named by its place in the data. */
export class Settlements {
  readonly count: number;
  readonly index: KDBush;
  readonly #directions: Float64Array;

  constructor(readonly data: SettlementData) {
    this.count = data.people.length;
    this.index = new KDBush(this.count, 64, Float64Array);
    this.#directions = new Float64Array(3 * this.count);
    for (let at = 0; at < this.count; at += 1) {
      const place = this.place(at);
      this.index.add(place.longitudeDeg, place.latitudeDeg);
      const [x, y, z] = directionOf(place);
      this.#directions[3 * at] = x;
      this.#directions[3 * at + 1] = y;
      this.#directions[3 * at + 2] = z;
    }
    this.index.finish();
  }

  place(at: number): Place {
    const { latitudesDeg, longitudesDeg } = this.data;
    return { latitudeDeg: latitudesDeg[at] as number, longitudeDeg: longitudesDeg[at] as number };
  }

  /** From the Earth's centre. */
  direction(at: number): Vector {
    const from = 3 * at;
    return [
      this.#directions[from],
      this.#directions[from + 1],
      this.#directions[from + 2],
    ] as unknown as Vector;
  }

  people(at: number): number {
    return this.data.people[at] as number;
  }

  countryCode(at: number): string {
    return this.data.countryCodes[this.data.countries[at] as number] as string;
  }

  /** Settlements whose point lies in the corridor, in the order of the data. */
  inside(corridor: Corridor): number[] {
    const seen = new Set<number>();
    for (const { west, south, east, north } of framesOf(corridor))
      for (const at of this.index.range(west, south, east, north))
        if (!seen.has(at) && containsPlace(corridor, this.place(at), this.direction(at))) seen.add(at);
    return [...seen].sort((a, b) => a - b);
  }

  /** Those of the given ones that lie in the corridor's overflight exclusion zone. */
  excluded(corridor: Corridor, among: readonly number[]): number[] {
    return among.filter((at) => isExcluded(corridor, this.place(at), this.direction(at)));
  }

  /** People of the given settlements by the gazetteer, and how many of them it has no figure for. */
  sum(of: readonly number[]): { readonly people: number; readonly withoutFigure: number } {
    let people = 0;
    let withoutFigure = 0;
    for (const at of of) {
      const here = this.people(at);
      people += here;
      if (here === 0) withoutFigure += 1;
    }
    return { people, withoutFigure };
  }
}

import type { CountryLand } from './land-inside.ts';
import type { LandMap } from './land-map.ts';
import type { Settlements } from './settlements.ts';

/** People to the square kilometre within a settlement, unless the study says otherwise: its area is people over it. */
export const PLACE_DENSITY_PER_KM2 = 1500;

/** People spread evenly over land, apart from those of the listed settlements. */
export interface SpreadCount {
  readonly people: number;
  /** Land of countries whose total of people is not known, m²: who lives there beyond the settlements is unknown. */
  readonly unknownLand: number;
}

interface Evenly {
  /** People beyond the listed settlements; null where the country's total is unknown. */
  readonly remaining: number | null;
  /** Land beyond the settlements' own, m²; all of it where they leave none. */
  readonly land: number;
  readonly beside: boolean;
}

/**
 * Each country's people beyond its listed settlements, spread evenly over its land beyond theirs: an assumption, for
 * the gazetteer holds under half of the world's people.
 */
export class SpreadPeople {
  readonly #countries: readonly Evenly[];
  readonly #codes: ReadonlyMap<string, number>;

  /** @param placeDensity people to the square metre within a settlement */
  constructor(
    readonly map: LandMap,
    readonly settlements: Settlements,
    readonly placeDensity: number,
  ) {
    if (!(placeDensity > 0)) throw new RangeError(`SpreadPeople: ${placeDensity} people to the square metre`);
    this.#codes = new Map(map.data.countries.map(({ code }, at) => [code, at]));
    const listed = this.#listed(Array.from({ length: settlements.count }, (_, at) => at));
    this.#countries = map.data.countries.map(({ people, land }, at): Evenly => {
      const own = listed[at] as number;
      const beyond = land - own / placeDensity;
      return {
        remaining: people === null ? null : Math.max(0, people - own),
        land: beyond > 0 ? beyond : land,
        beside: beyond > 0,
      };
    });
  }

  /** People of settlements, summed by the country whose land they are counted under. */
  #listed(of: readonly number[]): Float64Array {
    const sums = new Float64Array(this.map.data.countries.length);
    for (const at of of) {
      const country = this.#codes.get(this.settlements.countryCode(at));
      if (country !== undefined) sums[country] = (sums[country] as number) + this.settlements.people(at);
    }
    return sums;
  }

  /**
   * People spread over the land inside an area.
   * @param lands what the area holds of each country
   * @param inside the settlements in the area, whose own land nobody else is spread over
   */
  over(lands: readonly CountryLand[], inside: readonly number[]): SpreadCount {
    const listed = this.#listed(inside);
    let [people, unknownLand] = [0, 0];
    for (const { country, area } of lands) {
      const { remaining, land, beside } = this.#countries[country] as Evenly;
      const own = beside ? (listed[country] as number) / this.placeDensity : 0;
      if (remaining === null) unknownLand += area;
      else people += (remaining / land) * Math.max(0, area - own);
    }
    return { people, unknownLand };
  }

  /** People to the square metre over all of a country's land; null where its total is unknown. */
  density(country: number): number | null {
    const { remaining } = this.#countries[country] as Evenly;
    return remaining === null ? null : remaining / this.map.country(country).land;
  }
}

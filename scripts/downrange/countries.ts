import { createRequire } from 'node:module';
import iso from 'i18n-iso-countries';

const read = createRequire(import.meta.url);
type Table = Readonly<Record<string, Readonly<Record<string, string>>>>;

/** The latest year of the package's table; where a country has no figure for it, its latest since 2010 stands in. */
export const TOTALS_YEAR = 2020;
const YEARS = Array.from({ length: 11 }, (_, back) => String(TOTALS_YEAR - back));

/** The World Bank's own code where it is none of ISO 3166's. */
const OWN_CODES: Readonly<Record<string, string>> = { XKX: 'XK' };

/** People of a country in the year of the totals, by the gazetteer's two-letter code. */
export function countryTotals(): Map<string, number> {
  const table = read('world-countries-population-data/country-wise-data.json') as Table;
  const totals = new Map<string, number>();
  for (const row of Object.values(table)) {
    const code3 = row['Country Code'] ?? '';
    // Regions and income groups have codes of their own kind and find no country.
    const code = OWN_CODES[code3] ?? iso.alpha3ToAlpha2(code3);
    const people = Number(YEARS.map((year) => row[year]).find((figure) => Number(figure) > 0));
    if (code && people > 0) totals.set(code, people);
  }
  return totals;
}

/** The two-letter code of an atlas shape's ISO number, where it has one. */
export function codeOfNumber(id: string | number | undefined): string | undefined {
  return id === undefined ? undefined : iso.numericToAlpha2(String(id).padStart(3, '0'));
}

const names = new Intl.DisplayNames(['en'], { type: 'region', fallback: 'none' });

/** Land that the atlas gives no number and where the gazetteer lists nobody. */
export const NO_COUNTRY = 'ZZ';

/** A country's English name; its code where there is none. */
export const countryName = (code: string): string =>
  code === NO_COUNTRY ? 'No country listed' : (names.of(code) ?? code);

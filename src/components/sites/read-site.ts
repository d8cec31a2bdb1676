import { readLatitude, readLongitude } from '#core/csv/coordinates.ts';
import { MAX_ELEVATION_M, MIN_ELEVATION_M } from '#core/csv/limits.ts';
import { readNumber } from '#core/csv/numbers.ts';
import { readSectors, writeSectors } from '#core/csv/sectors.ts';
import { formatFull, formatNumber } from '#contract/format.ts';
import type { Site, SitePatch } from '#contract/site.ts';

/** A typed figure: what it was read as, or why it can't stand and what may have been meant. */
export type Reading<V> =
  | { readonly kind: 'read'; readonly value: V; readonly words: string }
  | { readonly kind: 'refused'; readonly message: string; readonly meant?: string | undefined };

const refused = (
  message: string,
  meant?: string,
): { kind: 'refused'; message: string; meant?: string | undefined } => ({
  kind: 'refused',
  message,
  meant,
});

/** A decimal point slipped by one or two places: what is left when it is put back. */
function slipped(degrees: number, most: number): string | undefined {
  const back = [10, 100, 1000].map((factor) => degrees / factor).find((value) => Math.abs(value) <= most);
  return back === undefined ? undefined : formatFull(Number(back.toFixed(8)));
}

export function latitudeOf(text: string): Reading<number> {
  const reading = readLatitude(text);
  if (reading.kind === 'read')
    return {
      kind: 'read',
      value: reading.latitudeDeg,
      words: `read as ${formatNumber(reading.latitudeDeg, 4)}`,
    };
  const { code, message, degrees } = reading;
  const meant =
    code === 'out-of-range' && degrees !== null && Math.abs(degrees) > 360 ? slipped(degrees, 90) : undefined;
  return refused(message, meant);
}

export function longitudeOf(text: string): Reading<number> {
  const reading = readLongitude(text);
  if (reading.kind === 'read') {
    const { longitudeDeg, change } = reading;
    const words = `read as ${formatNumber(longitudeDeg, 4)}${change ? ', brought into −180 to 180' : ''}`;
    return { kind: 'read', value: longitudeDeg, words };
  }
  const { code, message, degrees } = reading;
  if (code !== 'out-of-range' || degrees === null) return refused(message);
  if (degrees < -180 && degrees >= -360)
    return refused(message, formatFull(Number((degrees + 360).toFixed(10))));
  return refused(message, slipped(degrees, 180));
}

export function elevationOf(text: string): Reading<number> {
  if (text.trim() === '') return { kind: 'read', value: 0, words: 'read as 0 m' };
  const value = readNumber(text, false);
  if (value === undefined) return refused(`Elevation “${text.trim()}” is not a number of metres.`);
  if (value < MIN_ELEVATION_M || value > MAX_ELEVATION_M)
    return refused(`Elevation ${formatFull(value)} is outside −500 m to 9,000 m.`);
  return { kind: 'read', value, words: `read as ${formatFull(value)} m` };
}

export function azimuthsOf(text: string): Reading<[number, number][]> {
  const reading = readSectors(text);
  if (reading.kind === 'refused') return refused(reading.message);
  const value = reading.sectors.map(([from, to]): [number, number] => [from, to]);
  return { kind: 'read', value, words: `read as ${azimuthWords(value)}` };
}

/** "325–92; 200–250", or "all round" where none is given. */
export function azimuthWords(sectors: Site['permittedAzimuthsDeg']): string {
  if (sectors.length === 0) return 'all round';
  return sectors.map(([from, to]) => `${formatFull(from)}–${formatFull(to)}`).join('; ');
}

/** The columns of the table that are edited in their cell. */
export const CELLS = [
  'code',
  'name',
  'latitudeDeg',
  'longitudeDeg',
  'elevationM',
  'permittedAzimuthsDeg',
] as const;
export type CellKey = (typeof CELLS)[number];

export const CELL_NAMES: Record<CellKey, string> = {
  code: 'Code',
  name: 'Name',
  latitudeDeg: 'Latitude',
  longitudeDeg: 'Longitude',
  elevationM: 'Elevation',
  permittedAzimuthsDeg: 'Permitted azimuths',
};

/** A cell's value as it is read, printed to the column's decimals. */
export function cellWords(site: Site, key: CellKey): string {
  switch (key) {
    case 'latitudeDeg':
    case 'longitudeDeg':
      return formatNumber(site[key], 4);
    case 'elevationM':
      return formatNumber(site.elevationM);
    case 'permittedAzimuthsDeg':
      return azimuthWords(site.permittedAzimuthsDeg);
    default:
      return site[key];
  }
}

/** A cell's value as it is edited: every digit, and in a form that is read back. */
export function cellText(site: Site, key: CellKey): string {
  const value = site[key];
  if (key === 'permittedAzimuthsDeg') return writeSectors(site.permittedAzimuthsDeg);
  return typeof value === 'number' ? formatFull(value).replaceAll(',', '') : String(value);
}

function textOf(text: string, what: string): Reading<string> {
  const value = text.trim();
  return value === '' ? refused(`${what} is empty.`) : { kind: 'read', value, words: '' };
}

/** What a cell's text changes. The contract's schema checks again on the server. */
export function readCell(key: CellKey, text: string): Reading<SitePatch> {
  const reading = readerOf[key](text);
  return reading.kind === 'read' ? { ...reading, value: { [key]: reading.value } } : reading;
}

const readerOf: Record<CellKey, (text: string) => Reading<unknown>> = {
  code: (text) =>
    /^[A-Za-z0-9]{2,8}$/.test(text.trim())
      ? { kind: 'read', value: text.trim().toUpperCase(), words: '' }
      : refused('A code has 2 to 8 letters or digits.'),
  name: (text) => textOf(text, 'Name'),
  latitudeDeg: latitudeOf,
  longitudeDeg: longitudeOf,
  elevationM: elevationOf,
  permittedAzimuthsDeg: azimuthsOf,
};

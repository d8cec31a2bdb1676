import { isCode } from './codes.ts';
import type { Column } from './columns.ts';
import { readLatitude, readLongitude } from './coordinates.ts';
import { stripGuard } from './guard.ts';
import type { SiteField } from './headings.ts';
import { lengthOf, MAX_ELEVATION_M, MAX_NAME_LENGTH, MAX_TEXT_LENGTH, MIN_ELEVATION_M } from './limits.ts';
import { readNumber, shown } from './numbers.ts';
import { change, refusal, type Reason } from './reasons.ts';
import { readSectors, type Sector } from './sectors.ts';

/** A site as a row gives it. What cannot be read is null; what the file leaves out has the value of a new site. */
export interface SiteReading {
  code: string | null;
  name: string;
  latitudeDeg: number | null;
  longitudeDeg: number | null;
  elevationM: number | null;
  permittedAzimuthsDeg: readonly Sector[] | null;
  notes: string;
  /** By criterion name: a number, or text as it was given. No entry where the cell is empty. */
  values: Record<string, number | string>;
  /** Low and high of those figures, by criterion name; no entry where neither is given. */
  particulars: Record<string, FigureBounds>;
}

/** Between what a figure is thought to lie, in the criterion's unit. */
export interface FigureBounds {
  low?: number | undefined;
  high?: number | undefined;
}

const METRES_A_FOOT = 0.3048;

/**
 * Reads one row's cells by itself, without regard to other rows.
 *
 * @param decimalComma whether a comma is the decimal mark
 * @returns the site as far as it can be read, and every reason found
 */
export function readRow(
  cells: readonly string[],
  columns: readonly Column[],
  decimalComma: boolean,
): { site: SiteReading; reasons: Reason[] } {
  const reasons: Reason[] = [];
  const site: SiteReading = {
    code: null,
    name: '',
    latitudeDeg: null,
    longitudeDeg: null,
    elevationM: 0,
    permittedAzimuthsDeg: [],
    notes: '',
    // Without a prototype, so that no heading can name one of an object's own members.
    values: Object.create(null) as SiteReading['values'],
    particulars: Object.create(null) as SiteReading['particulars'],
  };
  for (const column of columns) {
    if (column.field === 'unused') continue;
    const text = stripGuard((cells[column.index] ?? '').trim());
    if (column.field === 'criterion') readValue(site, column, text, decimalComma, reasons);
    else READERS[column.field](site, text, { decimalComma, feet: column.unit === 'ft', reasons });
  }
  return { site, reasons };
}

interface Reading {
  readonly decimalComma: boolean;
  readonly feet: boolean;
  readonly reasons: Reason[];
}

const READERS: Readonly<Record<SiteField, (site: SiteReading, text: string, reading: Reading) => void>> = {
  name(site, text, { reasons }) {
    site.name = text.replace(/\s+/g, ' ');
    if (site.name === '') reasons.push(refusal('empty', 'name', 'The name is empty.'));
    refuseLong(site.name, MAX_NAME_LENGTH, { field: 'name', called: 'The name' }, reasons);
  },
  code(site, text, { reasons }) {
    if (text === '') return;
    site.code = text.toUpperCase();
    if (isCode(text)) return;
    reasons.push(refusal('code-malformed', 'code', `Code ${shown(text)} is not 2 to 8 letters or digits.`));
  },
  latitudeDeg(site, text, { decimalComma, reasons }) {
    const read = readLatitude(text, decimalComma);
    site.latitudeDeg = read.kind === 'read' ? read.latitudeDeg : read.degrees;
    if (read.kind === 'refused') reasons.push(refusal(read.code, 'latitudeDeg', read.message));
  },
  longitudeDeg(site, text, { decimalComma, reasons }) {
    const read = readLongitude(text, decimalComma);
    site.longitudeDeg = read.kind === 'read' ? read.longitudeDeg : read.degrees;
    if (read.kind === 'refused') reasons.push(refusal(read.code, 'longitudeDeg', read.message));
    else if (read.change !== null) reasons.push(change('longitude-brought-in', 'longitudeDeg', read.change));
  },
  elevationM(site, text, { decimalComma, feet, reasons }) {
    if (text === '') return;
    const [, figure, unit] = /^(.*?)\s*(m|ft)?\.?$/is.exec(text) ?? [];
    const value = readNumber(figure ?? '', decimalComma);
    const inFeet = unit === undefined ? feet : unit.toLowerCase() === 'ft';
    site.elevationM = value === undefined ? null : inFeet ? feetToMetres(value) : value;
    if (site.elevationM === null) {
      reasons.push(refusal('not-a-number', 'elevationM', `Elevation “${shown(text)}” is not a number.`));
    } else if (site.elevationM < MIN_ELEVATION_M || site.elevationM > MAX_ELEVATION_M) {
      const range = `−${-MIN_ELEVATION_M} to ${MAX_ELEVATION_M.toLocaleString('en')} m`;
      const message = `Elevation ${shown(text)}${unit === undefined && feet ? ' ft' : ''} is outside ${range}.`;
      reasons.push(refusal('out-of-range', 'elevationM', message));
    }
  },
  permittedAzimuthsDeg(site, text, { decimalComma, reasons }) {
    const read = readSectors(text, decimalComma);
    site.permittedAzimuthsDeg = read.kind === 'read' ? read.sectors : null;
    if (read.kind === 'refused') reasons.push(refusal('sector', 'permittedAzimuthsDeg', read.message));
  },
  notes(site, text, { reasons }) {
    site.notes = text;
    refuseLong(text, MAX_TEXT_LENGTH, { field: 'notes', called: 'The notes' }, reasons);
  },
};

/** Rounded to a tenth of a millimetre, so that 100 ft are 30.48 m and not 30.480000000000004. */
function feetToMetres(feet: number): number {
  return Number((feet * METRES_A_FOOT).toFixed(4));
}

function readValue(
  site: SiteReading,
  column: Column,
  text: string,
  decimalComma: boolean,
  reasons: Reason[],
): void {
  // Lows and highs are read once it is known what the criterion's figures are.
  if (text === '' || column.criterion === null || column.part !== 'likely') return;
  site.values[column.criterion] = readNumber(text, decimalComma) ?? text;
  refuseLong(text, MAX_TEXT_LENGTH, { field: column.criterion, called: column.criterion }, reasons);
}

function refuseLong(
  text: string,
  limit: number,
  { field, called }: { field: string; called: string },
  reasons: Reason[],
): void {
  const length = lengthOf(text);
  if (length <= limit) return;
  const has = called === 'The notes' ? 'have' : 'has';
  reasons.push(
    refusal(
      'too-long',
      field,
      `${called} ${has} ${length} characters; at most ${limit.toLocaleString('en')}.`,
    ),
  );
}

import { addGuard } from './guard.ts';
import { readNumber } from './numbers.ts';
import { writeSectors, type Sector } from './sectors.ts';
import type { Delimiter } from './tokenise.ts';

/** A site as the export writes it. `values` are by criterion id. */
export interface ExportedSite {
  readonly code: string;
  readonly name: string;
  readonly latitudeDeg: number;
  readonly longitudeDeg: number;
  readonly elevationM: number;
  readonly permittedAzimuthsDeg: readonly Sector[];
  readonly notes: string;
  readonly values: Readonly<Record<string, number | string>>;
}

/** An entered criterion: a column of the export. */
export interface ExportedCriterion {
  readonly id: string;
  readonly name: string;
  readonly unit: string;
}

const HEADING = [
  'code',
  'name',
  'latitude_deg',
  'longitude_deg',
  'elevation_m',
  'permitted_azimuths',
  'notes',
];

/**
 * Writes sites as CSV (RFC 4180: commas, CRLF, quotes doubled) that can be uploaded again and gives the same sites.
 * Texts that a spreadsheet would take for a formula are guarded by an apostrophe, which the reader takes off;
 * figures are written plainly, so that −4.7 stays a number.
 *
 * @returns the text, without a byte order mark
 * @see RFC 4180
 */
export function writeSites(sites: readonly ExportedSite[], criteria: readonly ExportedCriterion[]): string {
  const names = criteria.map(({ name, unit }) => (/^[^()]{1,20}$/.test(unit) ? `${name} (${unit})` : name));
  const lines = sites.map((site) => [
    site.code,
    site.name,
    site.latitudeDeg,
    site.longitudeDeg,
    site.elevationM,
    writeSectors(site.permittedAzimuthsDeg),
    site.notes,
    ...criteria.map(({ id }) => site.values[id] ?? ''),
  ]);
  return writeCsv([[...HEADING, ...names], ...lines]);
}

/**
 * Writes any table as CSV made harmless for spreadsheets: numbers, as such or as text, plainly; texts guarded.
 * @param delimiter what parts the cells
 */
export function writeCsv(
  rows: readonly (readonly (string | number)[])[],
  delimiter: Delimiter = ',',
): string {
  return rows.map((row) => `${row.map(writeCell).join(delimiter)}\r\n`).join('');
}

function writeCell(value: string | number): string {
  const text =
    typeof value === 'number' || readNumber(value, false) !== undefined ? String(value) : addGuard(value);
  // Outer spaces are quoted too, because some readers drop them from bare cells.
  return /[",\r\n\t;]|^\s|\s$/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

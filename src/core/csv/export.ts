import { foldName } from './codes.ts';
import { addGuard } from './guard.ts';
import { readNumber } from './numbers.ts';
import { writeSectors, type Sector } from './sectors.ts';
import type { FigureBounds } from './row.ts';
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
  readonly particulars?: Readonly<Record<string, FigureBounds>> | undefined;
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
 * figures are written plainly, so that −4.7 stays a number. A criterion x that any site has a low or a high of is
 * followed by x_low and x_high.
 *
 * @returns the text, without a byte order mark
 * @see RFC 4180
 */
export function writeSites(sites: readonly ExportedSite[], criteria: readonly ExportedCriterion[]): string {
  const columns = criteria.flatMap((criterion) => figureColumns(criterion, sites, criteria));
  const lines = sites.map((site) => [
    site.code,
    site.name,
    site.latitudeDeg,
    site.longitudeDeg,
    site.elevationM,
    writeSectors(site.permittedAzimuthsDeg),
    site.notes,
    ...columns.map(({ cell }) => cell(site) ?? ''),
  ]);
  return writeCsv([[...HEADING, ...columns.map(({ heading }) => heading)], ...lines]);
}

interface FigureColumn {
  heading: string;
  cell: (site: ExportedSite) => number | string | undefined;
}

function figureColumns(
  { id, name, unit }: ExportedCriterion,
  sites: readonly ExportedSite[],
  criteria: readonly ExportedCriterion[],
): FigureColumn[] {
  const suffix = /^[^()]{1,20}$/.test(unit) ? ` (${unit})` : '';
  const own: FigureColumn = { heading: name + suffix, cell: (site) => site.values[id] };
  if (!sites.some(({ particulars }) => isBounded(particulars?.[id]))) return [own];
  // A criterion that is itself named "x_low" keeps that heading.
  const names = new Set(criteria.map((one) => foldName(one.name)));
  const between = ['low', 'high'].some((part) => names.has(foldName(`${name}_${part}`))) ? ' ' : '_';
  const bound = (part: 'low' | 'high'): FigureColumn => ({
    heading: `${name}${between}${part}${suffix}`,
    cell: (site) => site.particulars?.[id]?.[part],
  });
  return [own, bound('low'), bound('high')];
}

const isBounded = (bounds: FigureBounds | undefined): boolean =>
  bounds?.low !== undefined || bounds?.high !== undefined;

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

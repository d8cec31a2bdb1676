import { matchColumns, type Column, type ColumnChoice } from './columns.ts';
import type { ExistingCriterion } from './criterion-columns.ts';
import { detectDelimiter, isBlank, isSeparatorLine } from './delimiter.ts';
import { decode, type Encoding } from './encoding.ts';
import { settleFigures } from './figures.ts';
import { MAX_FILE_BYTES, MAX_ROWS } from './limits.ts';
import { settleRows, type ExistingSite, type Outcome, type ReadRow, type Row } from './outcomes.ts';
import { refusal } from './reasons.ts';
import { readRow } from './row.ts';
import { tokenise, type CsvRecord, type Delimiter } from './tokenise.ts';

export interface ReadOptions {
  /** The study's sites, against which rows are duplicates or new. */
  readonly existing: readonly ExistingSite[];
  /** The study's criteria, which other columns may fill. */
  readonly criteria?: readonly ExistingCriterion[] | undefined;
  /** Changes to the columns as recognised. */
  readonly columns?: readonly ColumnChoice[] | undefined;
  readonly delimiter?: Delimiter | undefined;
  readonly encoding?: Encoding | undefined;
}

export interface SitesFile {
  readonly kind: 'read';
  readonly encoding: Encoding;
  readonly delimiter: Delimiter;
  readonly decimalComma: boolean;
  readonly columns: readonly Column[];
  readonly counts: Readonly<Record<Outcome, number>>;
  readonly rows: readonly Row[];
}

export interface UnreadableFile {
  readonly kind: 'refused';
  readonly code: 'too-large' | 'empty' | 'binary' | 'encoding' | 'heading' | 'columns' | 'too-many-rows';
  readonly message: string;
  /** Where only the heading fails: the columns found, so that a person can say what they are. */
  readonly columns: readonly Column[];
}

/**
 * Reads a file of candidate sites: the one reader, used by the browser before an upload and by the server for it.
 * The same bytes, sites and options give the same answer everywhere.
 *
 * @param bytes the file, at most 5 MB
 * @returns every row with its outcome, reasons and line; or why the file as a whole cannot be read
 * @see RFC 4180 for the format; limits.ts for what a file may hold
 */
export function readSites(bytes: Uint8Array, options: ReadOptions): SitesFile | UnreadableFile {
  if (bytes.byteLength > MAX_FILE_BYTES) return unreadable('too-large', 'The file is larger than 5 MB.');
  if (bytes.byteLength === 0) return unreadable('empty', 'The file is empty.');
  const decoded = decode(bytes, options.encoding);
  if (decoded.kind === 'refused') return unreadable(decoded.code, decoded.message);
  const delimiter = options.delimiter ?? detectDelimiter(decoded.text);
  const [heading, ...records] = tokenise(decoded.text, delimiter).filter(
    (record) => !isBlank(record) && !isSeparatorLine(record),
  );
  if (heading === undefined) return unreadable('empty', 'The file is empty.');
  const cells = trimEnd(heading.cells);
  const matched = matchColumns(cells, { choices: options.columns, criteria: options.criteria });
  if (matched.kind === 'refused') return unreadable(matched.code, matched.message, matched.columns);
  if (records.length === 0)
    return unreadable('empty', 'The file has a heading and no rows.', matched.columns);
  if (records.length > MAX_ROWS) {
    const message = `The file has ${records.length.toLocaleString('en')} rows; at most 10,000 are read.`;
    return unreadable('too-many-rows', message);
  }
  const decimalComma = hasDecimalComma(records, matched.columns, delimiter);
  const read = records.map((record) => readRecord(record, cells.length, matched.columns, decimalComma));
  const columns = settleFigures(read, matched.columns, { criteria: options.criteria ?? [], decimalComma });
  const rows = settleRows(read, options.existing);
  const { encoding } = decoded;
  return { kind: 'read', encoding, delimiter, decimalComma, columns, counts: count(rows), rows };
}

function unreadable(
  code: UnreadableFile['code'],
  message: string,
  columns: readonly Column[] = [],
): UnreadableFile {
  return { kind: 'refused', code, message, columns };
}

/** Without the empty cells that spreadsheets leave at the end of a line. */
function trimEnd(cells: readonly string[]): readonly string[] {
  let end = cells.length;
  while (end > 0 && cells[end - 1]?.trim() === '') end -= 1;
  return cells.slice(0, end);
}

/**
 * A comma is the decimal mark where the separator is a semicolon; and in a table pasted with tabs, where a
 * coordinate is written with one.
 */
function hasDecimalComma(
  records: readonly CsvRecord[],
  columns: readonly Column[],
  delimiter: Delimiter,
): boolean {
  if (delimiter !== '\t') return delimiter === ';';
  const coordinates = columns.filter(({ field }) => field === 'latitudeDeg' || field === 'longitudeDeg');
  return records.some((record) =>
    coordinates.some(({ index }) => /^\s*\S?\d+,\d+/.test(record.cells[index] ?? '')),
  );
}

function readRecord(
  record: CsvRecord,
  width: number,
  columns: readonly Column[],
  decimalComma: boolean,
): ReadRow {
  const { line, cells, unclosed } = record;
  const read = readRow(cells, columns, decimalComma);
  const found = trimEnd(cells).length;
  if (unclosed) {
    const message = `A quote opened on line ${line} or after it is never closed.`;
    return { line, cells, site: read.site, reasons: [refusal('unclosed-quote', null, message)] };
  }
  if (found > width || cells.length < width) {
    const [code, has] =
      found > width ? (['too-many-columns', found] as const) : (['too-few-columns', cells.length] as const);
    const message = `The row has ${has} columns, the heading ${width}.`;
    return { line, cells, site: read.site, reasons: [refusal(code, null, message)] };
  }
  return { line, cells, ...read };
}

function count(rows: readonly Row[]): Record<Outcome, number> {
  const counts = { new: 0, duplicate: 0, refused: 0 };
  for (const row of rows) counts[row.outcome] += 1;
  return counts;
}

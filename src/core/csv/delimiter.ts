import { recognise } from './headings.ts';
import { DELIMITERS, tokenise, type CsvRecord, type Delimiter } from './tokenise.ts';

const SAMPLE_RECORDS = 30;
/** Enough for the records of any likely file: 2,000 characters each. */
const SAMPLE_CHARACTERS = 60_000;

/** True for a record in which nothing is written: an empty line, or a spreadsheet's row of bare separators. */
export function isBlank(record: CsvRecord): boolean {
  return record.cells.every((cell) => cell.trim() === '');
}

/** A first line `sep=;`, by which some spreadsheets name their separator. */
export function isSeparatorLine(record: CsvRecord): boolean {
  return record.line === 1 && /^sep=.?$/i.test(record.cells[0] ?? '');
}

/**
 * Finds what parts the cells: the separator under which most of the headings are recognised, then the one that
 * gives the most rows as many cells as the heading has. A `sep=` line decides outright.
 */
export function detectDelimiter(text: string): Delimiter {
  const named = /^sep=([,;\t])\r?[\r\n]/i.exec(text)?.[1];
  const told = DELIMITERS.find((delimiter) => delimiter === named);
  if (told !== undefined) return told;
  const sample = text.slice(0, SAMPLE_CHARACTERS);
  let best: Delimiter = ',';
  let most = 0;
  for (const delimiter of DELIMITERS) {
    const score = scoreOf(sample, delimiter);
    if (score > most) [best, most] = [delimiter, score];
  }
  return best;
}

function scoreOf(sample: string, delimiter: Delimiter): number {
  const [heading, ...rows] = tokenise(sample, delimiter, SAMPLE_RECORDS).filter((record) => !isBlank(record));
  if (heading === undefined || heading.cells.length < 2) return 0;
  const known = new Set(
    heading.cells.map((cell) => recognise(cell)?.field).filter((field) => field !== undefined),
  );
  const even = rows.filter((row) => row.cells.length === heading.cells.length).length;
  return 1 + known.size * 2 + even / Math.max(1, rows.length);
}

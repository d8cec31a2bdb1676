import Papa from 'papaparse';

export const DELIMITERS = [',', ';', '\t'] as const;
export type Delimiter = (typeof DELIMITERS)[number];

/** One record of the file: its cells as text, and the physical line it begins on, counted from 1. */
export interface CsvRecord {
  readonly line: number;
  readonly cells: readonly string[];
  /** True where a quote was opened and the file ended before it was closed. */
  readonly unclosed: boolean;
}

/**
 * Splits CSV text into records by RFC 4180, more forgiving: lines may end in CRLF, LF or CR, mixed; a quote inside
 * an unquoted cell is a plain character (seconds of arc); spaces before an opening quote are dropped; what follows
 * a closing quote is kept. A CR alone inside quotes is read as LF.
 *
 * @param text the decoded file
 * @param delimiter what parts the cells
 * @param limit stop after this many records
 * @see RFC 4180
 */
export function tokenise(text: string, delimiter: Delimiter, limit?: number): CsvRecord[] {
  const lines = text.replace(/\r(?!\n)/g, '\n');
  const { data, errors, meta } = parse(lines, delimiter, limit);
  const unclosed = errors.find(({ code }) => code === 'MissingQuotes')?.row;
  // What ends the last line begins an empty record for the parser.
  if (!meta.truncated && unclosed === undefined && lines.endsWith('\n')) data.pop();
  let line = 1;
  return data.map((cells, row) => {
    dropReturn(cells);
    const record = { line, cells, unclosed: row === unclosed };
    line += 1;
    for (const cell of cells) line += countNewlines(cell);
    return record;
  });
}

/** Rewrites the text only where it departs from RFC 4180, because rewriting takes longer than parsing. */
function parse(text: string, delimiter: Delimiter, limit: number | undefined): Papa.ParseResult<string[]> {
  const options = { delimiter, newline: '\n', ...(limit !== undefined && { preview: limit }) } as const;
  const isSpaced = new RegExp(`(?:^|[${delimiter}\n]) +"`).test(text);
  const result = isSpaced ? undefined : Papa.parse<string[]>(text, options);
  if (result && !result.errors.some(({ code }) => code === 'InvalidQuotes')) return result;
  return Papa.parse<string[]>(toStrict(text, delimiter), options);
}

/** Drops spaces before an opening quote and moves what follows a closing one inside. */
function toStrict(text: string, delimiter: Delimiter): string {
  const quotedCell = new RegExp(
    `(^|[${delimiter}\n]) *"([^"]*(?:""[^"]*)*)(?:"([^${delimiter}\r\n]*)|$)`,
    'g',
  );
  return text.replace(quotedCell, (_cell, before: string, quoted: string, after?: string) => {
    const opened = `${before}"${quoted}`;
    return after === undefined ? opened : `${opened}${after.trimEnd().replaceAll('"', '""')}"`;
  });
}

/** Takes the CR of a CRLF off the last cell. Inside quotes a CR stands before an LF, never last. */
function dropReturn(cells: string[]): void {
  const last = cells.at(-1);
  if (last?.endsWith('\r')) cells[cells.length - 1] = last.slice(0, -1);
}

function countNewlines(cell: string): number {
  let count = 0;
  for (let at = cell.indexOf('\n'); at !== -1; at = cell.indexOf('\n', at + 1)) count += 1;
  return count;
}

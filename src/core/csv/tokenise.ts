export const DELIMITERS = [',', ';', '\t'] as const;
export type Delimiter = (typeof DELIMITERS)[number];

/** One record of the file: its cells as text, and the physical line it begins on, counted from 1. */
export interface CsvRecord {
  readonly line: number;
  readonly cells: readonly string[];
  /** True where a quote was opened and the file ended before it was closed. */
  readonly unclosed: boolean;
}

const QUOTE = 34;
const SPACE = 32;
const CR = 13;
const LF = 10;

/**
 * Splits CSV text into records by RFC 4180, more forgiving: lines may end in CRLF, LF or CR, mixed; a quote inside
 * an unquoted cell is a plain character (seconds of arc); spaces before an opening quote are dropped; what follows
 * a closing quote is kept.
 *
 * @param text the decoded file
 * @param delimiter what parts the cells
 * @param limit stop after this many records
 * @see RFC 4180; tests/core/csv/tokenise.test.ts compares with a general-purpose library
 */
export function tokenise(text: string, delimiter: Delimiter, limit = Number.POSITIVE_INFINITY): CsvRecord[] {
  const records: CsvRecord[] = [];
  const split = delimiter.charCodeAt(0);
  let at = 0;
  let line = 1;
  while (at < text.length && records.length < limit) {
    const cells: string[] = [];
    const first = line;
    let unclosed = false;
    for (;;) {
      const cell = isQuotedFrom(text, at) ? readQuoted(text, at, split) : readPlain(text, at, split);
      cells.push(cell.value);
      line += cell.newlines;
      unclosed ||= cell.unclosed;
      at = cell.end;
      if (at >= text.length || text.charCodeAt(at) !== split) break;
      at += 1;
    }
    at = skipLineEnd(text, at);
    line += 1;
    records.push({ line: first, cells, unclosed });
  }
  return records;
}

interface Cell {
  readonly value: string;
  readonly end: number;
  readonly newlines: number;
  readonly unclosed: boolean;
}

function isQuotedFrom(text: string, start: number): boolean {
  let at = start;
  while (text.charCodeAt(at) === SPACE) at += 1;
  return text.charCodeAt(at) === QUOTE;
}

function readPlain(text: string, start: number, split: number): Cell {
  const end = endOfPlain(text, start, split);
  return { value: text.slice(start, end), end, newlines: 0, unclosed: false };
}

function readQuoted(text: string, start: number, split: number): Cell {
  let at = text.indexOf('"', start) + 1;
  let value = '';
  for (;;) {
    const close = text.indexOf('"', at);
    if (close === -1) {
      value += text.slice(at);
      return { value, end: text.length, newlines: countLineEnds(value), unclosed: true };
    }
    value += text.slice(at, close);
    at = close + 1;
    if (text.charCodeAt(at) !== QUOTE) break;
    value += '"';
    at += 1;
  }
  const newlines = countLineEnds(value);
  const end = endOfPlain(text, at, split);
  return { value: value + text.slice(at, end).trimEnd(), end, newlines, unclosed: false };
}

function endOfPlain(text: string, start: number, split: number): number {
  let at = start;
  while (at < text.length) {
    const code = text.charCodeAt(at);
    if (code === split || code === LF || code === CR) break;
    at += 1;
  }
  return at;
}

function skipLineEnd(text: string, at: number): number {
  return text.charCodeAt(at) === CR && text.charCodeAt(at + 1) === LF ? at + 2 : at + 1;
}

function countLineEnds(text: string): number {
  return text.match(/\r\n|\r|\n/g)?.length ?? 0;
}

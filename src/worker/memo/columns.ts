import type { MemoCell, MemoColumn, MemoRow } from '#contract/memo.ts';

/** Width of a character of IBM Plex Mono, as a share of its size. */
const CHARACTER = 0.6;

export interface Column extends MemoColumn {
  /** Whole characters of the figure font. */
  characters: number;
  /** Points. */
  width: number;
}

/**
 * Widths of a table's columns, snapped to whole characters of the figure font, so that figures side by side can be
 * set as one padded text.
 * @param width of the table, points.
 */
export function snapped(columns: readonly MemoColumn[], width: number, fontSize: number): Column[] {
  const all = columns.reduce((sum, { share }) => sum + share, 0);
  const character = fontSize * CHARACTER;
  let share = 0;
  let before = 0;
  return columns.map((column) => {
    share += column.share;
    const edge = Math.floor((share / all) * (width / character) + 1e-9);
    const characters = edge - before;
    before = edge;
    return { ...column, characters, width: characters * character };
  });
}

/** Characters that the figure font has; anything else is set in the text font. */
const FIGURE = /^[ -~−–°±×·]*$/;
export const isFigure = (text: string): boolean => FIGURE.test(text);

/** Cells of a row that are set as one text. */
export interface Run {
  from: number;
  cells: MemoCell[];
  width: number;
  /** Figures padded to their columns; else one cell, which wraps. */
  padded: boolean;
}

const fits = (cell: MemoCell, column: Column): boolean =>
  column.align === 'right' &&
  cell.span === undefined &&
  isFigure(cell.text) &&
  cell.text.length < column.characters;

/**
 * A row's cells, figures in neighbouring columns taken together: laying out a text costs about a millisecond whatever
 * its length, and a long memo has thousands of figures.
 */
export function runsOf(row: MemoRow, columns: readonly Column[]): Run[] {
  const runs: Run[] = [];
  let at = 0;
  for (const cell of row.cells) {
    const taken = columns.slice(at, at + (cell.span ?? 1));
    const [column] = taken;
    if (!column) break;
    const last = runs.at(-1);
    const padded = fits(cell, column);
    const width = taken.reduce((sum, one) => sum + one.width, 0);
    if (padded && last?.padded) {
      last.cells.push(cell);
      last.width += width;
    } else runs.push({ from: at, cells: [cell], width, padded });
    at += taken.length;
  }
  return runs;
}

/** A figure at the right of its column, with a character's room before the next one. */
export const padded = (cell: MemoCell, { characters }: Column): string =>
  `${cell.text.padStart(characters - 1)} `;

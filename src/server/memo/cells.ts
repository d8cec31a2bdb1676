import { formatNumber } from '#contract/format.ts';
import type { Criterion } from '#contract/criterion.ts';
import type { MemoCell, MemoColumn, MemoRow, MemoTable } from '#contract/memo.ts';
import type { PrintedSite } from './printed-sites.ts';

/** A column of words. */
export const words = (heading: string, share: number, first = false, unit = ''): MemoColumn => ({
  heading,
  unit,
  align: 'left',
  share,
  first,
});

/** A column of figures, with their unit in the heading. */
export const figures = (heading: string, unit: string, share: number, first = false): MemoColumn => ({
  heading,
  unit,
  align: 'right',
  share,
  first,
});

/** A figure of a table: zero is "0" whatever the column's decimals, so that it differs from what rounds to it. */
export const figure = (value: number, decimals: number): string =>
  value === 0 ? '0' : formatNumber(value, decimals);

/** A criterion's unit as a heading shows it; a rating's figures are steps. */
export const unitOf = ({ source, unit }: Pick<Criterion, 'source' | 'unit'>): string =>
  source === 'rating' ? 'step 0–4' : unit;

export const cell = (text: string, strong = false): MemoCell => ({ text, strong });

export const row = (cells: MemoCell[], mark: MemoRow['mark'] = 'plain'): MemoRow => ({ cells, mark });

/** How a site's row is marked wherever it stands. */
export const markOf = ({ standing }: Pick<PrintedSite, 'standing'>): MemoRow['mark'] =>
  standing === 'leads' || standing === 'set-aside' ? standing : 'plain';

/** A table; its number is given when the memo is put together. */
export const table = (
  caption: string,
  columns: MemoColumn[],
  rows: MemoRow[],
  notes: string[] = [],
): MemoTable => ({ kind: 'table', number: 0, caption, columns, rows, notes });

/** Cuts a list into runs of a most, as even as they come: 9 by at most 7 is 5 and 4. */
export function runsOf<T>(list: readonly T[], most: number): T[][] {
  const runs = Math.ceil(list.length / most);
  const size = Math.ceil(list.length / Math.max(runs, 1));
  return Array.from({ length: runs }, (_, run) => list.slice(run * size, (run + 1) * size));
}

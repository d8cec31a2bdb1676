import type { MemoCell, MemoColumn, MemoRow } from '#contract/memo.ts';

/** A cell with its column, as the preview sets it. */
export interface PlacedCell {
  cell: MemoCell;
  column: MemoColumn;
  /** Name and unit of the column, which stand beside the figure where a row is read as a list. */
  label: string;
  /** Names the row. */
  head: boolean;
}

/** The column that names a row: the first of words, or the first of all. */
const headOf = (columns: readonly MemoColumn[]): number =>
  Math.max(
    0,
    columns.findIndex(
      ({ heading, align }) => align === 'left' && (heading === 'Site' || heading === 'Criterion'),
    ),
  );

/** A row's cells, each under the column it begins in. */
export function cellsOf({ cells }: MemoRow, columns: readonly MemoColumn[]): PlacedCell[] {
  const head = headOf(columns);
  let at = 0;
  return cells.flatMap((cell) => {
    const place = at;
    const column = columns[place];
    at += cell.span ?? 1;
    if (!column) return [];
    const label = [column.heading, column.unit].filter(Boolean).join(', ');
    return [{ cell, column, label: cell.span === undefined ? label : '', head: place === head }];
  });
}

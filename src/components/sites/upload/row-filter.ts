import type { Row } from '#core/csv/outcomes.ts';

/** How a row looks to a person: refused, changed, warned of, a duplicate, or accepted as it stands. */
export type RowState = 'refused' | 'changed' | 'warned' | 'duplicate' | 'accepted';

export const ROW_FILTERS = [
  'telling',
  'refused',
  'changed',
  'warned',
  'duplicate',
  'accepted',
  'all',
] as const;
/** `telling`: every row that has something to say. */
export type RowFilter = (typeof ROW_FILTERS)[number];

/** The states of the worst first, as they are listed. */
const ORDER: readonly RowState[] = ['refused', 'duplicate', 'changed', 'warned', 'accepted'];

export function stateOf({ outcome, reasons }: Row): RowState {
  if (outcome === 'refused') return 'refused';
  if (outcome === 'duplicate') return 'duplicate';
  if (reasons.some((reason) => reason.severity === 'change')) return 'changed';
  return reasons.some((reason) => reason.severity === 'warning') ? 'warned' : 'accepted';
}

export function countStates(rows: readonly Row[]): Record<RowState, number> {
  const counts = { refused: 0, changed: 0, warned: 0, duplicate: 0, accepted: 0 };
  for (const row of rows) counts[stateOf(row)] += 1;
  return counts;
}

/** The rows that a filter leaves: the worst first, then by line; all of them in the order of the file. */
export function filterRows(rows: readonly Row[], filter: RowFilter): readonly Row[] {
  if (filter === 'all') return rows;
  const fits = (state: RowState) => (filter === 'telling' ? state !== 'accepted' : state === filter);
  const kept = rows.map((row) => ({ row, state: stateOf(row) })).filter(({ state }) => fits(state));
  kept.sort((a, b) => ORDER.indexOf(a.state) - ORDER.indexOf(b.state) || a.row.line - b.row.line);
  return kept.map(({ row }) => row);
}

/** Whether two readings come to the same rows: what the server read beside what the page showed. */
export function sameRows(
  a: readonly Pick<Row, 'line' | 'outcome'>[],
  b: readonly Pick<Row, 'line' | 'outcome'>[],
): boolean {
  return (
    a.length === b.length && a.every((row, i) => row.line === b[i]?.line && row.outcome === b[i]?.outcome)
  );
}

import type { Criterion } from '#core/decision/criterion.ts';
import { figureTable } from '#core/decision/figures.ts';
import { prepare, type Prepared } from '#core/decision/prepare.ts';

/** A criterion whose figures are its values, 0 to 1. */
const OWN_VALUE: Criterion = {
  direction: 'more',
  levels: { kind: 'fixed', worst: 0, best: 1 },
  limit: null,
};

/** Values 0…1, a row a site, as a prepared table. */
export const preparedValues = (rows: readonly (readonly number[])[]): Prepared =>
  prepare(
    (rows[0] ?? []).map(() => OWN_VALUE),
    figureTable(rows),
  );

/** "1;2|3;4" as rows of figures. */
export const rowsFrom = (text: string): number[][] =>
  text.split('|').map((row) => row.split(';').map(Number));

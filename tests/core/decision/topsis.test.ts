import { expect, test } from 'vitest';
import type { ValueTable } from '#core/decision/overall.ts';
import { closeness } from '#core/decision/topsis.ts';
import { reference } from '#tests/support/reference.ts';
import { rowsFrom } from './tables.ts';

/** The fighter's cost is the worse the higher; the method sees only its distances, which a sign turns round. */
const FIGHTER_COST = 3;

function tableOf(id: string, rows: number[][]): ValueTable {
  const signed = id.startsWith('fighter')
    ? rows.map((row) => row.map((x, j) => (j === FIGHTER_COST ? -x : x)))
    : rows;
  return {
    siteCount: rows.length,
    criterionCount: rows[0]?.length ?? 0,
    values: Float64Array.from(signed.flat()),
  };
}

test.each(reference('decision-topsis'))('$id', (row) => {
  const weights = Float64Array.from(row.weights.split(';'), Number);
  const close = closeness(tableOf(row.id, rowsFrom(row.rows)), weights);
  expect(close[Number(row.place)]).toBeWithin(row.expected, row.tolerance);
});

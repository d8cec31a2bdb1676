import { describe, expect, test } from 'vitest';
import type { Criterion } from '#core/decision/criterion.ts';
import { figureTable } from '#core/decision/figures.ts';
import { prepare } from '#core/decision/prepare.ts';
import { rank } from '#core/decision/rank.ts';
import { weightsFromPoints } from '#core/decision/weights.ts';
import { reference } from '#tests/support/reference.ts';

const numbers = (text: string): number[] => text.split(';').map(Number);
const weigh = (points: readonly number[]): Float64Array => {
  const result = weightsFromPoints(points);
  if (result.kind !== 'set') throw new Error('the row has no points');
  return result.weights;
};
const more = (worst: number, best: number): Criterion => ({
  direction: 'more',
  levels: { kind: 'fixed', worst, best },
  limit: null,
});

describe('weights from points', () => {
  test.each(reference('decision-weights'))('$id', (row) => {
    const weights = weigh(numbers(row.points));
    expect((weights[Number(row.place)] ?? NaN) * 100).toBeWithin(row.expected, row.tolerance);
  });
});

describe('additive value, office location', () => {
  test.each(reference('decision-office'))('$id', (row) => {
    const values = numbers(row.values);
    const prepared = prepare(
      values.map(() => more(0, 100)),
      figureTable([values]),
    );
    const { totals } = rank(prepared, weigh(numbers(row.points)));
    expect((totals[0] ?? NaN) * 100).toBeWithin(row.expected, row.tolerance);
  });
});

describe('additive value and order, fighter choice', () => {
  const rows = reference('decision-additive');
  const data = rows.map((row) => numbers(row.figures));
  const column = (j: number) => data.map((figures) => figures[j] ?? NaN);
  const COST = 3;
  // Benefits scale from 0 to the greatest; cost enters as least / x, already 0 to 1.
  const criteria = [0, 1, 2, 3, 4, 5].map((j) => (j === COST ? more(0, 1) : more(0, Math.max(...column(j)))));
  const least = Math.min(...column(COST));
  const table = figureTable(data.map((figures) => figures.map((x, j) => (j === COST ? least / x : x))));
  const { totals, ranked, ranks } = rank(prepare(criteria, table), weigh([0.2, 0.1, 0.1, 0.1, 0.2, 0.3]));

  test.each(rows.map((row, site) => ({ ...row, site })))('$id', (row) => {
    expect(totals[row.site]).toBeWithin(row.expected, row.tolerance);
    expect(ranks[ranked.indexOf(row.site)]).toBe(Number(row.rank));
  });
});

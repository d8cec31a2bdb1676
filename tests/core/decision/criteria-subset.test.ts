import { expect, test } from 'vitest';
import { criteriaOf } from '#core/decision/criteria-subset.ts';
import type { Criterion } from '#core/decision/criterion.ts';
import { figureTable } from '#core/decision/figures.ts';
import { prepare } from '#core/decision/prepare.ts';

const criterion = (over: Partial<Criterion> = {}): Criterion => ({
  direction: 'more',
  levels: { kind: 'candidates' },
  limit: null,
  ...over,
});
const criteria = [
  criterion({ limit: { kind: 'at-least', figure: 2 } }),
  criterion({ shape: { kind: 'exponential', curvature: 2 } }),
  criterion({ direction: 'less', limit: { kind: 'at-most', figure: 8 } }),
];
const rows = [
  [1, 5, 9],
  [2, null, 7],
  [3, 6, 'worst'],
] as const;

test('keeping some criteria is the same as preparing those alone, but what a site was set aside for stays', () => {
  const part = criteriaOf(prepare(criteria, figureTable(rows)), [2, 0]);
  const alone = prepare(
    [criteria[2]!, criteria[0]!],
    figureTable(rows.map(([first, , third]) => [third, first])),
  );
  expect({ ...part, failures: [] }).toEqual({ ...alone, failures: [] });
  expect(part.failures).toEqual([
    { site: 0, criterion: 1 },
    { site: 0, criterion: 0 },
    { site: 2, criterion: 0 },
  ]);
  expect([...criteriaOf(prepare(criteria, figureTable(rows)), [1]).setAside]).toEqual([1, 0, 1]);
});

test('a gap is one only under the criteria that are kept', () => {
  const prepared = prepare(criteria, figureTable(rows));
  expect([...criteriaOf(prepared, [0, 2]).gaps]).toEqual([0, 0, 0]);
  expect([...criteriaOf(prepared, [1]).gaps]).toEqual([0, 1, 0]);
});

test('a place that is none is refused', () => {
  expect(() => criteriaOf(prepare(criteria, figureTable(rows)), [0, 3])).toThrow(/criterion 3 of 3/);
});

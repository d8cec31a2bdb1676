import { expect, test } from 'vitest';
import { tableRows } from '#components/criteria/table-rows.ts';
import { criteria } from '../ranking/trial.ts';

const [model] = criteria;
if (!model) throw new Error('the trial has criteria');
const list = (...lines: (readonly [name: string, groupId: string | null])[]) =>
  lines.map(([name, groupId], position) => ({ ...model, id: name, name, groupId, position }));

test('criteria stand under their group, which stands where its first one does', () => {
  const rows = tableRows(list(['A', null], ['B', 'g'], ['C', null], ['D', 'g']));
  expect(rows.map((row) => (row.kind === 'group' ? row.groupId : row.criterion.name))).toEqual([
    'A',
    'g',
    'B',
    'D',
    'C',
  ]);
});

test('moving passes a whole group, and stays among a group’s own', () => {
  const rows = tableRows(list(['A', null], ['B', 'g'], ['D', 'g'], ['C', null]));
  const moves = rows.flatMap((row) => (row.kind === 'group' ? [] : [[row.criterion.name, row.up, row.down]]));
  expect(moves).toEqual([
    ['A', null, 2],
    ['B', null, 2],
    ['D', 1, null],
    ['C', 1, null],
  ]);
});

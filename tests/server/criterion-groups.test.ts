import { asc, eq } from 'drizzle-orm';
import { expect, test } from 'vitest';
import { CriterionInput } from '#contract/criterion.ts';
import { newId } from '#db/columns.ts';
import { record } from '#db/schema/record.ts';
import { addCriterion } from '#server/criteria/add-criterion.ts';
import { addGroup } from '#server/criteria/groups/add-group.ts';
import { removeGroup, renameGroup } from '#server/criteria/groups/change-group.ts';
import { listGroupsPage, readGroups } from '#server/criteria/groups/read-groups.ts';
import { readCriteria } from '#server/criteria/read-criteria.ts';
import type { Member } from '#server/member.ts';
import { testDatabase } from '#tests/support/database.ts';
import { studyWith } from '#tests/support/study.ts';

const { db } = await testDatabase();

const namesOf = async ({ studyId }: Member) => (await readGroups(db, { studyId })).map(({ name }) => name);
const lastLine = async ({ studyId }: Member) =>
  (await db.select().from(record).where(eq(record.studyId, studyId)).orderBy(asc(record.id))).at(-1);

test('a group is made empty, on the record, and moves the revision', async () => {
  const member = await studyWith(db, 'engineer');
  expect(await addGroup(db, { member, name: 'Money' })).toMatchObject({
    name: 'Money',
    version: 1,
    revision: 2,
  });
  expect(await lastLine(member)).toMatchObject({
    object: 'criterion-group',
    action: 'add',
    to: { name: 'Money' },
  });
});

test('names are unique in a study whatever their case and spacing, and free in another', async () => {
  const member = await studyWith(db, 'engineer');
  const money = await addGroup(db, { member, name: 'Money' });
  const refused = { code: 'invalid', errors: [{ path: 'name' }] };
  await expect(addGroup(db, { member, name: ' money' })).rejects.toMatchObject(refused);
  const time = await addGroup(db, { member, name: 'Time' });
  await expect(
    renameGroup(db, { member, groupId: time.id, version: 1, name: 'MONEY' }),
  ).rejects.toMatchObject(refused);
  expect(await renameGroup(db, { member, groupId: money.id, version: 1, name: 'MONEY' })).toMatchObject({
    name: 'MONEY',
    version: 2,
  });
  await addGroup(db, { member: await studyWith(db, 'lead'), name: 'Money' });
  expect(await namesOf(member)).toEqual(['MONEY', 'Time']);
});

test('renaming to the same name changes nothing, and a stale one is refused with what there is now', async () => {
  const member = await studyWith(db, 'engineer');
  const { id: groupId } = await addGroup(db, { member, name: 'Money' });
  expect(await renameGroup(db, { member, groupId, version: 1, name: 'Money' })).toMatchObject({
    version: 1,
    revision: 2,
  });
  await renameGroup(db, { member, groupId, version: 1, name: 'Funds' });
  await expect(renameGroup(db, { member, groupId, version: 1, name: 'Costs' })).rejects.toMatchObject({
    code: 'stale',
    current: { name: 'Funds', version: 2 },
  });
  await expect(removeGroup(db, { member, groupId, version: 1 })).rejects.toMatchObject({ code: 'stale' });
});

test('removing a group leaves its criteria in none; the record says which they were', async () => {
  const member = await studyWith(db, 'engineer');
  const { id: groupId } = await addGroup(db, { member, name: 'Money' });
  const input = CriterionInput.parse({ source: 'entered', name: 'Cost', direction: 'less', groupId });
  const cost = await addCriterion(db, { member, input });
  await removeGroup(db, { member, groupId, version: 1 });
  expect(await readGroups(db, member)).toEqual([]);
  expect(await readCriteria(db, member)).toMatchObject([{ name: 'Cost', groupId: null, version: 2 }]);
  expect(await lastLine(member)).toMatchObject({
    action: 'remove',
    from: { name: 'Money', criterionIds: [cost.id] },
    to: null,
  });
});

test('a group of another study is not there to rename or remove', async () => {
  const { id: groupId } = await addGroup(db, { member: await studyWith(db, 'lead'), name: 'Money' });
  const member = await studyWith(db, 'lead');
  const gone = { code: 'not-found' };
  await expect(renameGroup(db, { member, groupId, version: 1, name: 'X' })).rejects.toMatchObject(gone);
  await expect(removeGroup(db, { member, groupId, version: 1 })).rejects.toMatchObject(gone);
  await expect(removeGroup(db, { member, groupId: newId(), version: 1 })).rejects.toMatchObject(gone);
});

test('in review the groups are locked', async () => {
  const member = await studyWith(db, 'engineer', { state: 'in-review' });
  await expect(addGroup(db, { member, name: 'Money' })).rejects.toMatchObject({ code: 'study-locked' });
});

test('lists by part of a name and by page', async () => {
  const member = await studyWith(db, 'engineer');
  for (const name of ['Money', 'Time', 'Moods']) await addGroup(db, { member, name });
  const found = await listGroupsPage(db, { studyId: member.studyId, query: 'mo', page: 2, pageSize: 1 });
  expect(found).toMatchObject({ total: 2, items: [{ name: 'Moods' }] });
});

import { asc, eq } from 'drizzle-orm';
import pg from 'pg';
import { expect, test } from 'vitest';
import { record } from '#db/schema/record.ts';
import { study } from '#db/schema/study.ts';
import { changeStudy, type ChangeKind } from '#server/change-study.ts';
import type { AppError } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { testDatabase } from '#tests/support/database.ts';
import { studyWith } from '#tests/support/study.ts';

const { db, ownerUrl } = await testDatabase();

const retitle = (member: Member, kind: ChangeKind, title: string) =>
  changeStudy(db, { member, kind }, async (tx, row) => {
    await tx.update(study).set({ title }).where(eq(study.id, row.id));
    return {
      result: { title },
      entries: [{ object: 'study', objectId: row.id, action: 'rename', from: row.title, to: title }],
    };
  });

const rowOf = async ({ studyId }: Member) => (await db.select().from(study).where(eq(study.id, studyId)))[0];
const linesOf = ({ studyId }: Member) => db.select().from(record).where(eq(record.studyId, studyId));
const codeOf = (attempt: Promise<unknown>) =>
  attempt.then(
    () => 'done',
    (error: AppError) => error.code,
  );

test('a change of inputs moves the revision and is recorded: who, what, from, to', async () => {
  const member = await studyWith(db, 'engineer');
  expect(await retitle(member, 'inputs', 'Second')).toMatchObject({ title: 'Second', revision: 2 });
  expect(await rowOf(member)).toMatchObject({ title: 'Second', revision: 2 });
  expect(await linesOf(member)).toMatchObject([
    { userId: member.userId, object: 'study', action: 'rename', from: 'Trial', to: 'Second', revision: 2 },
  ]);
});

test('a change apart from inputs and weights is recorded without moving the revision', async () => {
  const member = await studyWith(db, 'lead');
  await retitle(member, 'apart', 'Second');
  expect(await rowOf(member)).toMatchObject({ revision: 1 });
  expect(await linesOf(member)).toHaveLength(1);
});

test('a change that fails leaves neither rows nor record', async () => {
  const member = await studyWith(db, 'lead');
  const failing = changeStudy(db, { member, kind: 'inputs' }, async (tx, row) => {
    await tx.update(study).set({ title: 'Lost' }).where(eq(study.id, row.id));
    throw new Error('half way');
  });
  await expect(failing).rejects.toThrow('half way');
  expect(await rowOf(member)).toMatchObject({ title: 'Trial', revision: 1 });
  expect(await linesOf(member)).toEqual([]);
});

test.each([
  ['in-review', 'inputs', 'study-locked'],
  ['in-review', 'weights', 'study-locked'],
  ['in-review', 'apart', 'done'],
  ['draft', 'inputs', 'done'],
  ['baselined', 'inputs', 'forbidden'],
  ['baselined', 'apart', 'done'],
] as const)('an engineer in a study %s, change of %s: %s', async (state, kind, expected) => {
  const member = await studyWith(db, 'engineer', { state });
  expect(await codeOf(retitle(member, kind, 'Second'))).toBe(expected);
});

test('the lead’s change after a baseline returns the study to draft', async () => {
  const member = await studyWith(db, 'lead', { state: 'baselined' });
  await retitle(member, 'inputs', 'Second');
  expect(await rowOf(member)).toMatchObject({ state: 'draft', revision: 2 });
});

test.each(['inputs', 'apart'] as const)('an archived study refuses a change of %s', async (kind) => {
  const member = await studyWith(db, 'lead', { archivedAt: new Date(0) });
  expect(await codeOf(retitle(member, kind, 'Second'))).toBe('study-archived');
});

test('changes at the same time take turns: no revision is skipped or given twice', async () => {
  const member = await studyWith(db, 'engineer');
  const made = await Promise.all(['a', 'b', 'c', 'd'].map((title) => retitle(member, 'inputs', title)));
  expect(made.map(({ revision }) => revision).sort()).toEqual([2, 3, 4, 5]);
});

test('many lines are numbered in their order, and keep what they say', async () => {
  const member = await studyWith(db, 'engineer');
  const says = [undefined, null, 'Trial', '', 1.5, false, [], { a: null, b: ['"', 'Gråskjær'] }];
  const entries = Array.from({ length: 2_500 }, (_, i) => ({
    object: 'site',
    objectId: String(i),
    action: 'change',
    from: says[i % says.length],
    to: says[(i + 1) % says.length],
  }));
  await changeStudy(db, { member, kind: 'inputs' }, async () => ({ result: {}, entries }));
  const { studyId, userId } = member;
  const lines = await db.select().from(record).where(eq(record.studyId, studyId)).orderBy(asc(record.id));
  expect(lines).toMatchObject(
    entries.map(({ from, to, ...line }) => ({
      ...line,
      userId,
      revision: 2,
      from: from ?? null,
      to: to ?? null,
    })),
  );
});

test('not even the owner changes the record', async () => {
  const member = await studyWith(db, 'engineer');
  await retitle(member, 'inputs', 'Second');
  const owner = new pg.Client({ connectionString: ownerUrl });
  await owner.connect();
  for (const statement of ['update record set action = $$x$$', 'delete from record', 'truncate record'])
    await expect(owner.query(statement)).rejects.toThrow('append-only');
  await owner.end();
});

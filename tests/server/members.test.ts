import { and, eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { user } from '#db/schema/auth.ts';
import { record } from '#db/schema/record.ts';
import { member as memberTable, study } from '#db/schema/study.ts';
import type { AppError } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { addMember } from '#server/members/add-member.ts';
import { changeRole } from '#server/members/change-role.ts';
import { listMembers } from '#server/members/list-members.ts';
import { bindPendingMemberships, listInvitationRequests } from '#server/members/pending.ts';
import { removeMember } from '#server/members/remove-member.ts';
import { testDatabase } from '#tests/support/database.ts';
import { joined, person, studyWith } from '#tests/support/study.ts';

const { db } = await testDatabase();

const all = { query: '', page: 1, pageSize: 50 };
const codeOf = (attempt: Promise<unknown>) =>
  attempt.then(
    () => 'done',
    (error: AppError) => error.code,
  );
const linesOf = ({ studyId }: Member) =>
  db.select().from(record).where(eq(record.studyId, studyId)).orderBy(record.id);
const versionOf = async (memberId: string) =>
  (await db.select().from(memberTable).where(eq(memberTable.id, memberId)))[0]?.version ?? 0;

describe('adding', () => {
  test('an address with an account is a member at once', async () => {
    const lead = await studyWith(db, 'lead');
    const { userId } = await person(db, 'Tove Marsh');
    const added = await addMember(db, {
      member: lead,
      input: { email: `${userId}@spinward.test`, role: 'engineer' },
    });
    expect(added).toMatchObject({ name: 'Tove Marsh', role: 'engineer', standing: 'active', you: false });
    expect(await linesOf(lead)).toMatchObject([
      { object: 'member', objectId: added.id, action: 'add', userId: lead.userId, from: null, revision: 1 },
    ]);
  });

  test('an unknown address waits, and the administrator is asked once however many studies want it', async () => {
    const input = { email: 'nobody@yet.test', role: 'reviewer' as const };
    for (const lead of [await studyWith(db, 'lead'), await studyWith(db, 'lead')])
      expect(await addMember(db, { member: lead, input })).toMatchObject({ name: null, standing: 'pending' });
    const asked = (await listInvitationRequests(db)).filter(({ email }) => email === input.email);
    expect(asked).toMatchObject([{ email: input.email, studies: 2, askedBy: 'Ada Quill' }]);
  });

  test('the same address twice is refused', async () => {
    const lead = await studyWith(db, 'lead');
    const input = { email: 'twice@yet.test', role: 'reader' as const };
    await addMember(db, { member: lead, input });
    expect(await codeOf(addMember(db, { member: lead, input }))).toBe('conflict');
  });

  test('goes on while the study is in review, and not while it is archived', async () => {
    const input = { email: 'later@yet.test', role: 'reader' as const };
    const inReview = await studyWith(db, 'lead', { state: 'in-review' });
    expect(await codeOf(addMember(db, { member: inReview, input }))).toBe('done');
    const archived = await studyWith(db, 'lead', { archivedAt: new Date() });
    expect(await codeOf(addMember(db, { member: archived, input }))).toBe('study-archived');
  });
});

describe('a pending member', () => {
  test('belongs to the account from the day it is made, in every study, and each record says so', async () => {
    const leads = [await studyWith(db, 'lead'), await studyWith(db, 'lead')];
    const email = 'newcomer@yet.test';
    for (const lead of leads) await addMember(db, { member: lead, input: { email, role: 'engineer' } });
    const { userId } = await person(db, 'New Comer');
    await db.update(user).set({ email }).where(eq(user.id, userId));
    await db.transaction((tx) => bindPendingMemberships(tx, { userId, email: 'Newcomer@Yet.test' }));
    for (const lead of leads) {
      const { items } = await listMembers(db, { member: lead, ...all });
      expect(items).toContainEqual(
        expect.objectContaining({ email, name: 'New Comer', role: 'engineer', standing: 'active' }),
      );
      expect(await linesOf(lead)).toContainEqual(
        expect.objectContaining({ object: 'member', action: 'join', userId }),
      );
    }
    expect((await listInvitationRequests(db)).map((request) => request.email)).not.toContain(email);
  });
});

describe('the last lead', () => {
  test('neither leaves nor is demoted', async () => {
    const lead = await studyWith(db, 'lead');
    const { memberId } = lead;
    expect(await codeOf(removeMember(db, { member: lead, memberId, version: 1 }))).toBe('conflict');
    expect(await codeOf(changeRole(db, { member: lead, memberId, version: 1, role: 'reader' }))).toBe(
      'conflict',
    );
    expect(await linesOf(lead)).toEqual([]);
  });

  test('a deactivated or a pending lead is no lead to leave a study to', async () => {
    const lead = await studyWith(db, 'lead');
    const gone = await joined(db, { studyId: lead.studyId, role: 'lead' });
    await db.update(user).set({ deactivatedAt: new Date() }).where(eq(user.id, gone.userId));
    await addMember(db, { member: lead, input: { email: 'pending-lead@yet.test', role: 'lead' } });
    const { memberId } = lead;
    expect(await codeOf(removeMember(db, { member: lead, memberId, version: 1 }))).toBe('conflict');
    const { items } = await listMembers(db, { member: lead, ...all });
    expect(items.map(({ standing }) => standing).sort()).toEqual(['active', 'deactivated', 'pending']);
  });

  test('of two leads who leave at once, one stays', async () => {
    const first = await studyWith(db, 'lead');
    const second = await joined(db, { studyId: first.studyId, role: 'lead' });
    const outcomes = await Promise.all(
      [first, second].map((member) =>
        codeOf(removeMember(db, { member, memberId: member.memberId, version: 1 })),
      ),
    );
    expect(outcomes.sort()).toEqual(['conflict', 'done']);
  });
});

describe('changing and removing', () => {
  test('a role changes on the version it was based on, and the record keeps both', async () => {
    const lead = await studyWith(db, 'lead');
    const other = await joined(db, { studyId: lead.studyId, role: 'reader' });
    const ask = { member: lead, memberId: other.memberId, role: 'engineer' as const };
    expect(await changeRole(db, { ...ask, version: 1 })).toMatchObject({ role: 'engineer', version: 2 });
    const stale = changeRole(db, { ...ask, role: 'reviewer', version: 1 });
    await expect(stale).rejects.toMatchObject({ code: 'stale', current: { role: 'engineer', version: 2 } });
    expect(await linesOf(lead)).toMatchObject([
      { action: 'change', from: { role: 'reader' }, to: { role: 'engineer' } },
    ]);
  });

  test.each(['engineer', 'reviewer', 'reader'] as const)(
    'a %s may leave and may not remove anyone else',
    async (role) => {
      const lead = await studyWith(db, 'lead');
      const member = await joined(db, { studyId: lead.studyId, role });
      const removal = { memberId: lead.memberId, version: await versionOf(lead.memberId) };
      expect(await codeOf(removeMember(db, { member, ...removal }))).toBe('forbidden');
      expect(await codeOf(removeMember(db, { member, memberId: member.memberId, version: 1 }))).toBe('done');
      const left = and(eq(memberTable.studyId, lead.studyId), eq(memberTable.userId, member.userId));
      expect(await db.select().from(memberTable).where(left)).toEqual([]);
      expect(await linesOf(lead)).toMatchObject([{ action: 'leave', userId: member.userId }]);
    },
  );

  test('one may leave an archived study', async () => {
    const lead = await studyWith(db, 'lead');
    const member = await joined(db, { studyId: lead.studyId, role: 'reader' });
    await db.update(study).set({ archivedAt: new Date() }).where(eq(study.id, lead.studyId));
    expect(await codeOf(removeMember(db, { member, memberId: member.memberId, version: 1 }))).toBe('done');
  });

  test('a member of another study is not found', async () => {
    const lead = await studyWith(db, 'lead');
    const elsewhere = await studyWith(db, 'lead');
    expect(await codeOf(removeMember(db, { member: lead, memberId: elsewhere.memberId, version: 1 }))).toBe(
      'not-found',
    );
  });
});

test('members are found by name or address, a page at a time, leads first', async () => {
  const lead = await studyWith(db, 'lead');
  for (const name of ['Bram Osei', 'Cleo Hart', 'Dara Finch'])
    await joined(db, { studyId: lead.studyId, role: 'reader', name });
  const page = await listMembers(db, { member: lead, ...all, pageSize: 2 });
  expect(page).toMatchObject({ total: 4, items: [{ role: 'lead', you: true }, { name: 'Bram Osei' }] });
  expect(await listMembers(db, { member: lead, ...all, query: 'CLEO' })).toMatchObject({
    total: 1,
    items: [{ name: 'Cleo Hart' }],
  });
  expect((await listMembers(db, { member: lead, ...all, query: '%' })).total).toBe(0);
});

import { describe, expect, test, vi } from 'vitest';
import { sql } from 'drizzle-orm';
import type { AppError } from '#server/errors.ts';
import type { SignedIn } from '#server/auth/actor.ts';
import { testDatabase } from '#tests/support/database.ts';
import { person, studyWith } from '#tests/support/study.ts';

const { db } = await testDatabase();
const { whoAsks } = await import('#server/auth/actor.ts');
const { acceptInvitation, readInvitation } = await import('#server/account/accept-invitation.ts');
const { invite, readInvitations, withdrawInvitation } = await import('#server/admin/invitations.ts');
const { readOutbox } = await import('#server/admin/outbox.ts');
const { addMember } = await import('#server/members/add-member.ts');
const { workJobs } = await import('#server/jobs/boss.ts');
const { deliverMail } = await import('#server/mail/deliver.ts');
const { stopAll } = await import('#server/lifecycle.ts');

const PASSWORD = 'tide tables of 1911';
const FIRST_PAGE = { page: 1, pageSize: 50 };

async function administrator(): Promise<SignedIn> {
  const { userId, name } = await person(db, 'Admin Aalto');
  await db.execute(sql`update "user" set administrator = true where id = ${userId}`);
  return { userId, name, email: `${userId}@spinward.test`, administrator: true, sessionToken: 's' };
}

/** The link's token, out of the mail that waits to be sent. */
async function tokenFor(email: string): Promise<string> {
  const { rows } = await db.execute<{ text: string }>(
    sql`select text from mail_message where to_address = ${email} order by created_at desc, id desc limit 1`,
  );
  return /\/invitation\/(\S+)/.exec(rows[0]?.text ?? '')?.[1] ?? '';
}

const codeOf = (attempt: Promise<unknown>) =>
  attempt.then(
    () => 'done',
    (error: AppError) => error.code,
  );
const cookieOf = (cookies: string[]): string => cookies.map((cookie) => cookie.split(';')[0]).join('; ');
const accept = (token: string) => acceptInvitation(db, token, { name: 'Bo Marsh', password: PASSWORD });

describe('an invitation', () => {
  test('makes an account once, signs it in, and gives it the studies that waited for it', async () => {
    const lead = await studyWith(db, 'lead');
    const email = 'bo@waits.test';
    await addMember(db, { member: lead, input: { email, role: 'engineer' } });
    const admin = await administrator();
    expect((await readInvitations(db, FIRST_PAGE)).requests).toMatchObject([{ email, studies: 1 }]);

    await invite(db, admin, { email, administrator: false });
    const token = await tokenFor(email);
    expect(await readInvitation(db, token)).toEqual({ usable: true, email, administrator: false });
    const cookies = await accept(token);
    const actor = await whoAsks(db, new Headers({ cookie: cookieOf(cookies) }));
    expect(actor).toMatchObject({ email, name: 'Bo Marsh', administrator: false });
    const { rows } = await db.execute(
      sql`select role from member where study_id = ${lead.studyId} and user_id = ${actor?.userId}`,
    );
    expect(rows).toEqual([{ role: 'engineer' }]);

    expect(await readInvitation(db, token)).toEqual({ usable: false });
    expect(await codeOf(accept(token))).toBe('gone');
    expect((await readInvitations(db, FIRST_PAGE)).requests).toEqual([]);
  });

  test('is accepted once even by two at the same moment', async () => {
    const email = 'twins@waits.test';
    await invite(db, await administrator(), { email, administrator: false });
    const token = await tokenFor(email);
    const outcomes = await Promise.all([codeOf(accept(token)), codeOf(accept(token))]);
    expect(outcomes.sort()).toEqual(['done', 'gone']);
  });

  test('is kept as a hash, and its link is nowhere but in the mail', async () => {
    const email = 'hashed@waits.test';
    const made = await invite(db, await administrator(), { email, administrator: true });
    const token = await tokenFor(email);
    expect(token.length).toBeGreaterThan(40);
    expect(JSON.stringify(made)).not.toContain(token);
    const kept = await db.execute(
      sql`select 1 from invitation where sha256 = ${token} union select 1 from record where "to"::text like ${`%${token}%`}`,
    );
    expect(kept.rows).toEqual([]);
  });

  test('out of date, withdrawn or replaced works no more', async () => {
    const admin = await administrator();
    const inviteTo = (email: string) => invite(db, admin, { email, administrator: false });
    await inviteTo('late@waits.test');
    const late = await tokenFor('late@waits.test');
    await db.execute(sql`update invitation set expires_at = now() where email = 'late@waits.test'`);
    const withdrawn = await inviteTo('withdrawn@waits.test');
    const dead = await tokenFor('withdrawn@waits.test');
    await withdrawInvitation(db, admin, withdrawn.id);
    await inviteTo('again@waits.test');
    const replaced = await tokenFor('again@waits.test');
    await inviteTo('again@waits.test');
    for (const token of [late, dead, replaced, 'made up']) {
      expect(await readInvitation(db, token)).toEqual({ usable: false });
      expect(await codeOf(accept(token))).toBe('gone');
    }
    expect(await codeOf(accept(await tokenFor('again@waits.test')))).toBe('done');
    expect(await codeOf(withdrawInvitation(db, admin, withdrawn.id))).toBe('not-found');
  });

  test('does not go to an address with an account', async () => {
    const admin = await administrator();
    const { userId } = await person(db, 'Known Person');
    const attempt = invite(db, admin, { email: `${userId}@spinward.test`, administrator: false });
    expect(await codeOf(attempt)).toBe('conflict');
  });
});

test('mail goes through the queue to the local server, and its text stays in the outbox alone', async () => {
  const email = 'østen@waits.test';
  await invite(db, await administrator(), { email, administrator: false });
  const token = await tokenFor(email);
  await workJobs('mail', deliverMail);
  const kept = await vi.waitFor(
    async () => {
      const outbox = await readOutbox(db, FIRST_PAGE);
      const found = outbox.kept.items.find(({ text }) => text.includes(token));
      expect(outbox.sent.items.every(({ state }) => state === 'sent')).toBe(true);
      return found ?? expect.unreachable('the invitation is not there yet');
    },
    { timeout: 15_000, interval: 200 },
  );
  expect(kept).toMatchObject({ subject: 'Your invitation to Spinward' });
  const { rows } = await db.execute(sql`select 1 from mail_message where text <> ''`);
  expect(rows).toEqual([]);
  await stopAll();
});

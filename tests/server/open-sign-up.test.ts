import { expect, test } from 'vitest';
import { sql } from 'drizzle-orm';
import { testDatabase } from '#tests/support/database.ts';
import { studyWith } from '#tests/support/study.ts';

const { db } = await testDatabase();
process.env['SPINWARD_OPEN_SIGNUP'] = '1';
const { handleAuth } = await import('#server/auth/handle.ts');
const { addMember } = await import('#server/members/add-member.ts');

const ORIGIN = 'http://127.0.0.1:4321';

function ask(method: string, address: string, body?: unknown) {
  const request = new Request(address, {
    method,
    headers: { 'content-type': 'application/json', origin: ORIGIN },
    ...(body ? { body: JSON.stringify(body) } : {}),
  });
  return handleAuth({ db, request, clientAddress: '192.0.2.1', requestId: 'test' });
}

test('who registers with an address gets nothing of it before it is confirmed', async () => {
  const email = 'bo@waits.test';
  const password = 'tide tables of 1911';
  const lead = await studyWith(db, 'lead');
  await addMember(db, { member: lead, input: { email, role: 'engineer' } });
  const membersOf = async () =>
    (await db.execute(sql`select user_id from member where email = ${email} and user_id is not null`)).rows;

  const body = { name: 'Bo Marsh', email, password, callbackURL: '/studies' };
  const made = await ask('POST', `${ORIGIN}/api/auth/sign-up/email`, body);
  expect(made.status).toBe(200);
  expect(made.headers.getSetCookie()).toEqual([]);
  expect(await membersOf()).toEqual([]);
  const early = await ask('POST', `${ORIGIN}/api/auth/sign-in/email`, { email, password });
  expect(early.status).toBe(403);
  expect(await early.json()).toMatchObject({ title: expect.stringContaining('not confirmed') as string });

  const { rows } = await db.execute<{ text: string }>(
    sql`select text from mail_message where to_address = ${email} order by created_at limit 1`,
  );
  const link = /http\S+verify-email\S+/.exec(rows[0]?.text ?? '')?.[0] ?? '';
  const confirmed = await ask('GET', link);
  expect(confirmed.status).toBe(302);
  expect(confirmed.headers.get('location')).toBe('/studies');
  expect(confirmed.headers.getSetCookie().join()).toContain('session');
  expect(await membersOf()).toHaveLength(1);
  expect((await ask('POST', `${ORIGIN}/api/auth/sign-in/email`, { email, password })).status).toBe(200);
});

import { beforeEach, describe, expect, test } from 'vitest';
import { sql } from 'drizzle-orm';
import { testDatabase } from '#tests/support/database.ts';

const { db } = await testDatabase();
const { auth } = await import('#server/auth/auth.ts');
const { whoAsks } = await import('#server/auth/actor.ts');
const { handleAuth } = await import('#server/auth/handle.ts');
const { makePerson } = await import('#server/auth/make-person.ts');
const { updatePerson } = await import('#db/queries/person.ts');

const ORIGIN = 'http://127.0.0.1:4321';
const PASSWORD = 'tide tables of 1911';
let place = 0;

/** A post to the sign-in library's addresses, from an address of its own unless one is given. */
function post(path: string, body: unknown, { cookie, from }: { cookie?: string; from?: string } = {}) {
  place += 1;
  const headers = new Headers({ 'content-type': 'application/json', origin: ORIGIN });
  if (cookie) headers.set('cookie', cookie);
  const request = new Request(`${ORIGIN}/api/auth/${path}`, {
    method: 'POST',
    headers,
    body: JSON.stringify(body),
  });
  const clientAddress = from ?? `10.0.${Math.floor(place / 250)}.${place % 250}`;
  return handleAuth({ db, request, clientAddress, requestId: 'test' });
}

const signIn = (email: string, password = PASSWORD, from?: string) =>
  post('sign-in/email', { email, password }, from ? { from } : {});

const cookieOf = (response: Response): string =>
  response.headers
    .getSetCookie()
    .map((cookie) => cookie.split(';')[0])
    .join('; ');

const person = (email: string) =>
  db.transaction((tx) => makePerson(tx, { email, name: 'Ada Norn', password: PASSWORD }));

const whoHas = (cookie: string) => whoAsks(db, new Headers({ cookie }));

describe('signing in', () => {
  test('with the password opens a session, with another none', async () => {
    const userId = await person('ada@example.org');
    const good = await signIn('Ada@Example.org');
    expect(good.status).toBe(200);
    const cookie = cookieOf(good);
    expect(good.headers.get('set-cookie')).toMatch(/HttpOnly/i);
    expect(await whoHas(cookie)).toMatchObject({ userId, email: 'ada@example.org', administrator: false });

    const bad = await signIn('ada@example.org', 'tide tables of 1912');
    expect(bad.status).toBe(401);
    expect(bad.headers.get('content-type')).toBe('application/problem+json');
    expect(await bad.json()).toMatchObject({ code: 'sign-in-failed', status: 401 });
  });

  test('an unknown address is refused in the same words', async () => {
    await person('known@example.org');
    const [known, unknown] = [
      await signIn('known@example.org', 'x'),
      await signIn('nobody@example.org', 'x'),
    ];
    expect(await unknown.json()).toEqual(await known.json());
  });

  test('signing out everywhere ends every session', async () => {
    await person('twice@example.org');
    const [one, two] = [
      cookieOf(await signIn('twice@example.org')),
      cookieOf(await signIn('twice@example.org')),
    ];
    expect((await post('revoke-sessions', {}, { cookie: one })).status).toBe(200);
    expect(await whoHas(one)).toBeNull();
    expect(await whoHas(two)).toBeNull();
  });

  test('no address tells a script the session’s token', async () => {
    await person('script@example.org');
    const cookie = cookieOf(await signIn('script@example.org'));
    for (const path of ['get-session', 'list-sessions']) {
      const request = new Request(`${ORIGIN}/api/auth/${path}`, { headers: { cookie } });
      const answer = await handleAuth({ db, request, clientAddress: '192.0.2.1', requestId: 'test' });
      expect(answer.status).toBe(404);
    }
  });

  test('nobody registers on their own where sign-up is shut', async () => {
    const response = await post('sign-up/email', { name: 'X', email: 'x@example.org', password: PASSWORD });
    expect(response.status).toBe(403);
    expect(await (await signIn('x@example.org')).json()).toMatchObject({ code: 'sign-in-failed' });
  });

  test('who is deactivated does not get in, and a session of theirs is nobody', async () => {
    const userId = await person('gone@example.org');
    const before = cookieOf(await signIn('gone@example.org'));
    await updatePerson(db, { userId, values: { deactivatedAt: new Date() } });
    expect(await whoHas(before)).toBeNull();
    const refused = await signIn('gone@example.org');
    expect(refused.status).toBe(403);
    expect(refused.headers.getSetCookie()).toEqual([]);
    // Only who knows the password learns of it.
    expect((await signIn('gone@example.org', 'guess')).status).toBe(401);
  });
});

describe('limits (api.md: 20 a minute an address, 10 failed ones in 10 minutes an account)', () => {
  test('the eleventh attempt after ten failures waits, right password or not, from any address', async () => {
    await person('guessed@example.org');
    for (let i = 0; i < 10; i += 1) expect((await signIn('guessed@example.org', 'guess')).status).toBe(401);
    const eleventh = await signIn('guessed@example.org');
    expect(eleventh.status).toBe(429);
    expect(await eleventh.json()).toMatchObject({ code: 'too-many-requests' });
    const wait = Number(eleventh.headers.get('retry-after'));
    expect(wait).toBeGreaterThan(590);
    expect(wait).toBeLessThanOrEqual(600);

    // Ten minutes later the door opens again.
    await db.execute(sql`update sign_in_failure set at = at - interval '10 minutes'`);
    expect((await signIn('guessed@example.org')).status).toBe(200);
  });

  test('attempts made at once are all counted', async () => {
    await person('at-once@example.org');
    const answers = await Promise.all(
      Array.from({ length: 15 }, () => signIn('at-once@example.org', 'guess')),
    );
    const count = (status: number) => answers.filter((answer) => answer.status === status).length;
    expect([count(401), count(429)]).toEqual([10, 5]);
  });

  test('successes do not count against the account', async () => {
    await person('busy@example.org');
    for (let i = 0; i < 12; i += 1) expect((await signIn('busy@example.org')).status).toBe(200);
  });

  test('the twenty-first attempt of an address in a minute waits, whatever the account', async () => {
    const from = '192.0.2.7';
    for (let i = 0; i < 20; i += 1)
      expect((await signIn(`a${i}@example.org`, 'guess', from)).status).toBe(401);
    const refused = await signIn('a20@example.org', 'guess', from);
    expect(refused.status).toBe(429);
    expect(Number(refused.headers.get('retry-after'))).toBeGreaterThan(0);
    expect(Number(refused.headers.get('retry-after'))).toBeLessThanOrEqual(60);
    expect((await signIn('a20@example.org', 'guess', '192.0.2.8')).status).toBe(401);
    await db.execute(sql`update rate_limit set last_request = last_request - 60000`);
    expect((await signIn('a20@example.org', 'guess', from)).status).toBe(401);
  });
});

describe('passwords', () => {
  let cookie = '';
  let email = '';
  beforeEach(async () => {
    place += 1;
    email = `p${place}@example.org`;
    await person(email);
    cookie = cookieOf(await signIn(email));
  });

  test('are changed with the present one, which ends the other sessions', async () => {
    const other = cookieOf(await signIn(email));
    const body = { currentPassword: PASSWORD, newPassword: 'another tide table', revokeOtherSessions: true };
    const wrong = await post('change-password', { ...body, currentPassword: 'no' }, { cookie });
    expect(await wrong.json()).toMatchObject({ status: 422, code: 'invalid' });
    expect((await post('change-password', { ...body, newPassword: 'short' }, { cookie })).status).toBe(422);
    expect((await post('change-password', body, { cookie })).status).toBe(200);
    expect(await whoHas(other)).toBeNull();
    expect((await signIn(email, 'another tide table')).status).toBe(200);
    expect((await signIn(email)).status).toBe(401);
  });

  test('are reset by a link that is mailed, works once and ends every session', async () => {
    expect((await post('request-password-reset', { email })).status).toBe(200);
    const { rows } = await db.execute<{ text: string }>(
      sql`select text from mail_message where to_address = ${email}`,
    );
    const token = /\/reset\?token=(\S+)/.exec(rows[0]?.text ?? '')?.[1] ?? '';
    expect(token).not.toBe('');
    // What the database keeps of the token is a hash.
    const kept = await db.execute(sql`select 1 from verification where identifier like ${`%${token}%`}`);
    expect(kept.rows).toEqual([]);
    const body = { newPassword: 'set by the link', token };
    expect((await post('reset-password', body)).status).toBe(200);
    expect(await whoHas(cookie)).toBeNull();
    expect((await post('reset-password', body)).status).toBe(410);
    expect((await signIn(email, 'set by the link')).status).toBe(200);
  });

  test('a reset for an unknown address answers alike and mails nobody', async () => {
    const known = await post('request-password-reset', { email });
    const unknown = await post('request-password-reset', { email: 'nobody@example.org' });
    expect(await unknown.json()).toEqual(await known.json());
    const { rows } = await db.execute(
      sql`select 1 from mail_message where to_address = 'nobody@example.org'`,
    );
    expect(rows).toEqual([]);
  });

  test('are kept as a salted hash', async () => {
    const { rows } = await db.execute<{ password: string }>(
      sql`select password from account join "user" on "user".id = account.user_id where email = ${email}`,
    );
    expect(rows[0]?.password).not.toContain(PASSWORD);
    const { password } = await auth().$context;
    expect(await password.verify({ hash: rows[0]?.password ?? '', password: PASSWORD })).toBe(true);
  });
});

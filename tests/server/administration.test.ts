import { describe, expect, test } from 'vitest';
import { eq, sql } from 'drizzle-orm';
import { member as memberTable } from '#db/schema/study.ts';
import { record } from '#db/schema/record.ts';
import type { SignedIn } from '#server/auth/actor.ts';
import type { AppError } from '#server/errors.ts';
import { VehicleInput } from '#contract/vehicle.ts';
import { testDatabase } from '#tests/support/database.ts';
import { joined, person, studyWith } from '#tests/support/study.ts';

const { db } = await testDatabase();
const { whoAsks, sha256Hex } = await import('#server/auth/actor.ts');
const { changeName, readAccount } = await import('#server/account/profile.ts');
const { makeKey, MOST_KEYS, readKeys, withdrawKey } = await import('#server/account/keys.ts');
const { browserOf } = await import('#server/account/sessions.ts');
const { safeNext } = await import('#server/account/safe-next.ts');
const { changePerson, readPeople } = await import('#server/admin/people.ts');
const { nameLead, readLeaderless } = await import('#server/admin/leaderless.ts');
const { addVehicle, changeVehicle, readLibrary } = await import('#server/admin/vehicles.ts');

const FIRST_PAGE = { query: '', page: 1, pageSize: 50 };
const codeOf = (attempt: Promise<unknown>) =>
  attempt.then(
    () => 'done',
    (error: AppError) => error.code,
  );

async function actor(name: string, administrator = false): Promise<SignedIn> {
  const { userId } = await person(db, name);
  if (administrator) await db.execute(sql`update "user" set administrator = true where id = ${userId}`);
  return { userId, name, email: `${userId}@spinward.test`, administrator, sessionToken: 's' };
}

const versionOf = async (userId: string) => (await readAccount(db, userId)).version;

describe('people', () => {
  const patch = async (by: SignedIn, userId: string, what: { active?: boolean; administrator?: boolean }) =>
    changePerson(db, { administratorId: by.userId, userId, version: await versionOf(userId), patch: what });

  test('are deactivated with their sessions and keys, activated again, and never deleted', async () => {
    const admin = await actor('Admin One', true);
    const someone = await actor('Someone Once');
    const { key } = await makeKey(db, someone, 'nightly upload');
    await db.execute(
      sql`insert into session (id, expires_at, token, user_id) values ('x', now() + interval '1 day', 'x', ${someone.userId})`,
    );
    const bearer = new Headers({ authorization: `Bearer ${key}` });
    expect(await whoAsks(db, bearer)).toMatchObject({ userId: someone.userId });

    expect(await patch(admin, someone.userId, { active: false })).toMatchObject({ active: false });
    expect(await whoAsks(db, bearer)).toBeNull();
    const { rows } = await db.execute(sql`select 1 from session where user_id = ${someone.userId}`);
    expect(rows).toEqual([]);
    expect(await patch(admin, someone.userId, { active: true })).toMatchObject({ active: true });
    expect(await whoAsks(db, bearer)).toMatchObject({ userId: someone.userId });
    await expect(db.execute(sql`delete from "user" where id = ${someone.userId}`)).rejects.toThrow();
  });

  test('keep an administrator: the last one stays, two at once do not both go, and nobody deactivates themselves', async () => {
    await db.execute(sql`update "user" set administrator = false`);
    const one = await actor('Admin One', true);
    expect(await codeOf(patch(one, one.userId, { administrator: false }))).toBe('conflict');
    const two = await actor('Admin Two', true);
    expect(await codeOf(patch(two, two.userId, { active: false }))).toBe('conflict');
    const both = await Promise.all([
      codeOf(patch(one, two.userId, { administrator: false })),
      codeOf(patch(two, one.userId, { administrator: false })),
    ]);
    expect(both.sort()).toEqual(['conflict', 'done']);
    const { items } = await readPeople(db, one.userId, FIRST_PAGE);
    expect(items.filter(({ administrator, active }) => administrator && active)).toHaveLength(1);
  });

  test('are found by name or address, and a stale change is refused with what is there now', async () => {
    const admin = await actor('Admin Three', true);
    const someone = await actor('Quillon_100% Marsh');
    const found = await readPeople(db, admin.userId, { ...FIRST_PAGE, query: 'lon_100%' });
    expect(found.items.map(({ userId }) => userId)).toEqual([someone.userId]);
    const change = {
      administratorId: admin.userId,
      userId: someone.userId,
      version: 1,
      patch: { active: false },
    };
    await expect(changePerson(db, change)).rejects.toMatchObject({
      code: 'stale',
      current: { name: 'Quillon_100% Marsh', active: true },
    });
  });
});

describe('one’s own account', () => {
  test('changes its name by version, on the record', async () => {
    const { userId } = await actor('Old Name');
    const version = await versionOf(userId);
    const saved = await changeName(db, { userId, version, name: 'New Name' });
    expect(saved.name).toBe('New Name');
    expect(saved.version).toBeGreaterThan(version);
    expect(await codeOf(changeName(db, { userId, version, name: 'Third' }))).toBe('stale');
    const lines = await db.select().from(record).where(eq(record.objectId, userId));
    expect(lines).toMatchObject([{ action: 'change', from: { name: 'Old Name' }, to: { name: 'New Name' } }]);
  });

  test('makes keys that are told once, kept as a hash, used, and revoked', async () => {
    const someone = await actor('Key Holder');
    const { id, key } = await makeKey(db, someone, 'nightly upload');
    const { rows } = await db.execute<{ sha256: string }>(
      sql`select sha256 from personal_key where id = ${id}`,
    );
    expect(rows).toEqual([{ sha256: sha256Hex(key) }]);
    const listed = await readKeys(db, someone.userId);
    expect(JSON.stringify(listed)).not.toContain(key);
    expect(listed.items).toMatchObject([{ start: key.slice(0, 8), lastUsedAt: null }]);

    const bearer = new Headers({ authorization: `Bearer ${key}` });
    const asKey = await whoAsks(db, bearer);
    expect(asKey).toMatchObject({ userId: someone.userId, sessionToken: null });
    expect((await readKeys(db, someone.userId)).items[0]?.lastUsedAt).not.toBeNull();
    expect(await codeOf(makeKey(db, asKey as SignedIn, 'offspring'))).toBe('forbidden');

    const stranger = await actor('Stranger');
    expect(await codeOf(withdrawKey(db, stranger, id))).toBe('not-found');
    await withdrawKey(db, someone, id);
    expect(await whoAsks(db, bearer)).toBeNull();
    expect(await readKeys(db, someone.userId)).toEqual({ items: [], total: 0 });
  });

  test('holds twenty keys at most', async () => {
    const someone = await actor('Many Keys');
    for (let i = 0; i < MOST_KEYS; i += 1) await makeKey(db, someone, `key ${i}`);
    expect(await codeOf(makeKey(db, someone, 'one more'))).toBe('conflict');
  });

  test('names its sessions by browser and system', () => {
    const firefox = 'Mozilla/5.0 (X11; Linux x86_64; rv:140.0) Gecko/20100101 Firefox/140.0';
    const edge =
      'Mozilla/5.0 (Windows NT 10.0; Win64; x64) AppleWebKit/537.36 (KHTML, like Gecko) Chrome/140.0 Safari/537.36 Edg/140.0';
    const safari =
      'Mozilla/5.0 (iPhone; CPU iPhone OS 18_0 like Mac OS X) AppleWebKit/605.1.15 (KHTML, like Gecko) Version/18.0 Mobile Safari/604.1';
    expect([firefox, edge, safari, 'curl/8', null].map(browserOf)).toEqual([
      'Firefox on Linux',
      'Edge on Windows',
      'Safari on iPhone',
      'A program',
      'A program',
    ]);
  });
});

describe('a study without an active lead', () => {
  test('is shown by its people and given a lead, a member first or anyone active', async () => {
    const admin = await actor('Admin Four', true);
    const lead = await studyWith(db, 'lead');
    const engineer = await joined(db, { studyId: lead.studyId, role: 'engineer' });
    expect((await readLeaderless(db, FIRST_PAGE)).items).toEqual([]);
    const name = (userId: string) => codeOf(nameLead(db, admin, { studyId: lead.studyId, userId }));
    // With an active lead the study is nobody else's business.
    expect(await name(engineer.userId)).toBe('not-found');

    await db.execute(sql`update "user" set deactivated_at = now() where id = ${lead.userId}`);
    const [found] = (await readLeaderless(db, FIRST_PAGE)).items;
    expect(found).toMatchObject({ studyId: lead.studyId });
    expect(Object.keys(found ?? {}).sort()).toEqual(['createdAt', 'members', 'studyId']);
    expect(await name(lead.userId)).toBe('conflict');
    expect(await name(engineer.userId)).toBe('done');
    expect((await readLeaderless(db, FIRST_PAGE)).items).toEqual([]);

    await db.execute(sql`update "user" set deactivated_at = now() where id = ${engineer.userId}`);
    const outsider = await actor('Outside Hand');
    expect(await name(outsider.userId)).toBe('done');
    const roles = await db.select().from(memberTable).where(eq(memberTable.userId, outsider.userId));
    expect(roles).toMatchObject([{ studyId: lead.studyId, role: 'lead' }]);
    const lines = await db.select().from(record).where(eq(record.studyId, lead.studyId)).orderBy(record.id);
    expect(lines.map(({ action, userId }) => [action, userId])).toEqual([
      ['change', admin.userId],
      ['add', admin.userId],
    ]);
  });
});

describe('the vehicle library', () => {
  const vehicle = VehicleInput.parse({
    name: 'Test Stage',
    lossesMps: { gravity: 1200, drag: 120, steering: 80 },
    stages: [{ dryKg: 9000, propellantKg: 120_000, thrustVacKn: 2200, ispVacS: 311 }],
  });

  test('takes, edits, archives and restores a vehicle by its version', async () => {
    const admin = await actor('Admin Five', true);
    const made = await addVehicle(db, admin, { code: 'TEST-1', vehicle });
    expect(made).toMatchObject({ code: 'TEST-1', name: 'Test Stage', archived: false, version: 1 });
    await expect(addVehicle(db, admin, { code: 'TEST-1', vehicle })).rejects.toMatchObject({
      code: 'invalid',
      errors: [{ path: 'code' }],
    });
    const change = (version: number, patch: object) =>
      changeVehicle(db, admin, { vehicleId: made.id, version, patch });
    const renamed = await change(1, { vehicle: { ...vehicle, name: 'Test Stage B' } });
    expect(renamed).toMatchObject({ name: 'Test Stage B', version: 2 });
    expect(await codeOf(change(1, { archived: true }))).toBe('stale');
    expect(await change(2, { archived: true })).toMatchObject({ archived: true, version: 3 });
    expect((await readLibrary(db, FIRST_PAGE)).items).toMatchObject([{ id: made.id, archived: true }]);
    expect(await change(3, { archived: false })).toMatchObject({ archived: false, version: 4 });
    const lines = await db.select().from(record).where(eq(record.objectId, made.id));
    expect(lines.map(({ action }) => action)).toEqual(['add', 'change', 'change', 'change']);
  });
});

test.each([
  ['/studies/1/ranking?site=2#row', '/studies/1/ranking?site=2#row'],
  [null, '/studies'],
  ['', '/studies'],
  ['studies', '/studies'],
  ['https://elsewhere.test/', '/studies'],
  ['//elsewhere.test/', '/studies'],
  ['/\\elsewhere.test/', '/studies'],
  ['/\t/elsewhere.test/', '/studies'],
  ['/\n/elsewhere.test', '/studies'],
  ['/studies/..//elsewhere.test', '/studies'],
  ['javascript:alert(1)', '/studies'],
  ['/sign-in?next=/studies', '/studies'],
  ['/api/v1/account', '/studies'],
])('after signing in, %j leads to %s', (asked, leads) => {
  expect(safeNext(asked)).toBe(leads);
});

import { expect, test } from 'vitest';
import { newId } from '#db/columns.ts';
import { insertPerson } from '#db/queries/person.ts';
import { anotherAdministrator, firstAdministrator } from '#scripts/administrator.ts';
import { readInvitation } from '#server/account/accept-invitation.ts';
import { testDatabase } from '#tests/support/database.ts';

const { db } = await testDatabase();
const ORIGIN = 'https://s.example';
const tokenOf = (text: string): string => /\/invitation\/([\w-]{43})$/.exec(text)?.[1] ?? '';

test('the first administrator’s link works until the next start makes another', async () => {
  const first = tokenOf(await firstAdministrator(db, ORIGIN));
  expect(await readInvitation(db, first)).toEqual({ usable: true, email: null, administrator: true });
  const second = tokenOf(await firstAdministrator(db, ORIGIN));
  expect(await readInvitation(db, first)).toEqual({ usable: false });
  expect(await readInvitation(db, second)).toEqual({ usable: true, email: null, administrator: true });
});

test('npm run admin gives a link to an unknown address', async () => {
  const text = await anotherAdministrator(db, ORIGIN, 'New@Example.org');
  expect(text).toContain(`${ORIGIN}/invitation/`);
  const invited = { usable: true, email: 'new@example.org', administrator: true };
  expect(await readInvitation(db, tokenOf(text))).toEqual(invited);
});

test('npm run admin raises a known person, once, and the record says so', async () => {
  const known = { id: newId(), email: 'known@example.org', name: 'Known', administrator: false };
  await insertPerson(db, { ...known, passwordHash: 'none' });
  expect(await anotherAdministrator(db, ORIGIN, known.email)).toMatch(/is an administrator now\.$/);
  expect(await anotherAdministrator(db, ORIGIN, known.email)).toMatch(/is an administrator already\.$/);
  const { rows } = await db.execute(`select object, action, "to" from record`);
  expect(rows).toEqual([{ object: 'person', action: 'change', to: { administrator: true } }]);
});

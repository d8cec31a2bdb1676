import { verifyPassword } from 'better-auth/crypto';
import { eq } from 'drizzle-orm';
import { expect, test } from 'vitest';
import { account, user } from '#db/schema/auth.ts';
import { weightSet } from '#db/schema/criterion.ts';
import { site } from '#db/schema/site.ts';
import { libraryVehicle, member, study, studyVehicle, targetOrbit } from '#db/schema/study.ts';
import { DEMO_DOMAIN, DEMO_PASSWORD, DEMO_PEOPLE } from '#scripts/demo.ts';
import { scenario } from '#seed/demo/scenario.ts';
import { loadLibrary } from '#seed/load-library.ts';
import { loadDemo } from '#seed/load.ts';
import { testDatabase } from '#tests/support/database.ts';

const { db } = await testDatabase();

test('a library that is empty gets the two vehicles, once', async () => {
  await loadLibrary(db);
  await loadLibrary(db);
  const codes = (await db.select().from(libraryVehicle)).map(({ code }) => code);
  expect(codes.sort()).toEqual(['ALDER-S', 'ROWAN-M']);
});

test('the demo is loaded once, all or nothing, however often and however many ask at once', async () => {
  const broken = { ...scenario, people: scenario.people.slice(1) };
  await expect(loadDemo(db, broken)).rejects.toThrow('nobody signs in as lead');
  expect(await db.select().from(user)).toEqual([]);
  const outcomes = await Promise.all([loadDemo(db, scenario), loadDemo(db, scenario)]);
  expect(outcomes.sort()).toEqual([false, true]);
  expect(await loadDemo(db, scenario)).toBe(false);
  expect(await db.select().from(study)).toHaveLength(2);
});

test('everyone signs in with the published password; one is an administrator', async () => {
  const people = await db.select().from(user);
  expect(people.map(({ email }) => email).sort()).toEqual(
    DEMO_PEOPLE.map((name) => `${name}@${DEMO_DOMAIN}`).sort(),
  );
  expect(people.filter(({ administrator }) => administrator)).toHaveLength(1);
  for (const { password } of await db.select().from(account))
    expect(await verifyPassword({ hash: password ?? '', password: DEMO_PASSWORD })).toBe(true);
});

test('the main study has a member in every role, five orbits, twelve sites and a vehicle of the library', async () => {
  const [main] = await db.select().from(study).where(eq(study.title, scenario.studies[0].title));
  const of = main?.id ?? '';
  const roles = (await db.select().from(member).where(eq(member.studyId, of))).map(({ role }) => role);
  expect([...new Set(roles)].sort()).toEqual(['engineer', 'lead', 'reader', 'reviewer']);
  expect(await db.select().from(targetOrbit).where(eq(targetOrbit.studyId, of))).toHaveLength(5);
  const sites = await db.select().from(site).where(eq(site.studyId, of));
  expect(sites).toHaveLength(12);
  const latitudes = sites.map(({ latitudeDeg }) => latitudeDeg);
  expect([Math.min(...latitudes), Math.max(...latitudes)].map(Math.round)).toEqual([-55, 70]);
  const [vehicle] = await db.select().from(studyVehicle).where(eq(studyVehicle.studyId, of));
  expect(vehicle?.libraryVehicleId).not.toBeNull();
  const sets = await db.select().from(weightSet).where(eq(weightSet.studyId, of));
  expect(sets.filter(({ userId }) => userId === null)).toHaveLength(1);
  expect(sets.length).toBeGreaterThan(1);
});

import { hashPassword } from 'better-auth/crypto';
import type { Db, PooledDb } from '#db/client.ts';
import { newId } from '#db/columns.ts';
import { writeContents } from '#db/queries/contents.ts';
import { insertMember } from '#db/queries/member.ts';
import { insertStudy } from '#db/queries/study.ts';
import { writeWeights } from '#db/queries/weights.ts';
import { account, user } from '#db/schema/auth.ts';
import { DEMO_DOMAIN, DEMO_PASSWORD } from '#scripts/demo.ts';
import { writeRecord } from '#server/change-study.ts';
import { scenarioVehicle } from '#server/studies/example.ts';
import { scenarioContents } from '#server/studies/scenario-contents.ts';
import type { DemoPerson, DemoStudy, Scenario } from './demo/shape.ts';
import { fillLibrary, lockSeed } from './load-library.ts';

const emailOf = (login: string): string => `${login}@${DEMO_DOMAIN}`;

/** Makes the accounts as better-auth keeps them. @returns ids by login */
async function makePeople(tx: Db, people: readonly DemoPerson[]): Promise<Map<string, string>> {
  const ids = new Map<string, string>();
  for (const { login, name, administrator = false } of people) {
    const id = newId();
    ids.set(login, id);
    await tx.insert(user).values({ id, name, email: emailOf(login), emailVerified: true, administrator });
    const password = await hashPassword(DEMO_PASSWORD);
    await tx
      .insert(account)
      .values({ id: newId(), accountId: id, providerId: 'credential', userId: id, password });
  }
  return ids;
}

const idOf = (ids: ReadonlyMap<string, string>, login: string): string => {
  const id = ids.get(login);
  if (id === undefined) throw new RangeError(`demo: nobody signs in as ${login}`);
  return id;
};

async function makeStudy(tx: Db, study: DemoStudy, people: ReadonlyMap<string, string>): Promise<void> {
  const lead = study.members.find(({ role }) => role === 'lead');
  if (!lead) throw new RangeError(`demo: ${study.title} has no lead`);
  const createdBy = idOf(people, lead.login);
  const { id: studyId } = await insertStudy(tx, { title: study.title, createdBy });
  for (const { login, role } of study.members)
    await insertMember(tx, {
      studyId,
      email: emailOf(login),
      userId: idOf(people, login),
      role,
      addedBy: createdBy,
    });
  const { contents, saying } = scenarioContents(study, await scenarioVehicle(tx, study.vehicleCode));
  const { weightsByIds } = await writeContents(tx, { studyId, contents });
  for (const { login, points, shared = false } of study.ownPoints)
    await writeWeights(tx, {
      studyId,
      userId: idOf(people, login),
      id: null,
      values: { ...weightsByIds(saying(points)), shared },
    });
  const to = { title: study.title, origin: 'demo', sites: study.sites.length, orbits: study.orbits.length };
  await writeRecord(tx, { studyId, userId: createdBy, revision: 1 }, [
    { object: 'study', objectId: studyId, action: 'add', to },
  ]);
}

/**
 * Loads the demo into a database without people, all or nothing; anywhere else it does nothing, so it can run any
 * number of times. @returns whether it was loaded now
 */
export async function loadDemo(db: PooledDb, scenario: Scenario): Promise<boolean> {
  return db.transaction(async (tx) => {
    await lockSeed(tx);
    await fillLibrary(tx);
    const [someone] = await tx.select({ id: user.id }).from(user).limit(1);
    if (someone) return false;
    const people = await makePeople(tx, scenario.people);
    // The list shows the latest first, and the example is what one comes to look at.
    for (const study of [...scenario.studies].reverse()) await makeStudy(tx, study, people);
    return true;
  });
}

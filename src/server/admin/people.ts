import type { Person, PersonList, PersonPatch } from '#contract/admin.ts';
import type { ListQuery } from '#contract/list.ts';
import type { Db, PooledDb } from '#db/client.ts';
import {
  countOtherAdministrators,
  deleteSessions,
  listPeople,
  lockPerson,
  updatePerson,
  type PersonRow,
} from '#db/queries/person.ts';
import { versionOf } from '#server/account/profile.ts';
import { lockAdministrators } from './lock.ts';
import { writeRecord, type RecordEntry } from '#server/change-study.ts';
import { AppError, notFound, stale } from '#server/errors.ts';

const present = (row: PersonRow, viewerId: string, lastSeenAt: Date | null): Person => ({
  userId: row.id,
  name: row.name,
  email: row.email,
  administrator: row.administrator,
  active: row.deactivatedAt === null,
  you: row.id === viewerId,
  createdAt: row.createdAt.toISOString(),
  lastSeenAt: lastSeenAt?.toISOString() ?? null,
  version: versionOf(row),
});

export async function readPeople(db: Db, viewerId: string, query: ListQuery): Promise<PersonList> {
  const { rows, total } = await listPeople(db, query);
  return { items: rows.map((row) => present(row, viewerId, row.lastSeenAt)), total };
}

async function refuseLastAdministrator(tx: Db, row: PersonRow, patch: PersonPatch): Promise<void> {
  const leaves = patch.active === false || patch.administrator === false;
  if (!row.administrator || row.deactivatedAt || !leaves) return;
  if ((await countOtherAdministrators(tx, { userId: row.id })) > 0) return;
  throw new AppError(
    'conflict',
    `${row.name} is the only active administrator. Make someone else one first. Nothing was changed.`,
  );
}

function entryOf(before: PersonRow, after: PersonRow): RecordEntry | undefined {
  const state = (row: PersonRow) => ({
    administrator: row.administrator,
    active: row.deactivatedAt === null,
  });
  const [from, to] = [state(before), state(after)];
  if (from.administrator === to.administrator && from.active === to.active) return undefined;
  return { object: 'person', objectId: before.id, action: 'change', from, to };
}

interface PersonChange {
  administratorId: string;
  userId: string;
  version: number;
  patch: PersonPatch;
}

/**
 * Makes someone an administrator or no longer one, deactivates or activates them. Who is deactivated is signed out
 * everywhere at once.
 * @throws AppError 'not-found' · 'stale' · 'conflict' at the last administrator and for deactivating oneself
 */
export async function changePerson(db: PooledDb, change: PersonChange): Promise<Person> {
  const { administratorId, userId, version, patch } = change;
  return db.transaction(async (tx) => {
    await lockAdministrators(tx);
    const row = await lockPerson(tx, { userId });
    if (!row) throw notFound('There is no such person.');
    if (versionOf(row) !== version) throw stale(present(row, administratorId, null));
    if (patch.active === false && userId === administratorId)
      throw new AppError('conflict', 'Another administrator has to deactivate you. Nothing was changed.');
    await refuseLastAdministrator(tx, row, patch);
    const values = {
      administrator: patch.administrator ?? row.administrator,
      deactivatedAt: patch.active === undefined ? row.deactivatedAt : patch.active ? null : new Date(),
    };
    const entry = entryOf(row, { ...row, ...values });
    if (!entry) return present(row, administratorId, null);
    const after = (await updatePerson(tx, { userId, values })) ?? row;
    if (after.deactivatedAt) await deleteSessions(tx, { userId });
    await writeRecord(tx, { studyId: null, userId: administratorId, revision: null }, [entry]);
    return present(after, administratorId, null);
  });
}

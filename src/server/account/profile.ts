import type { Account, AccountPatch } from '#contract/account.ts';
import type { Db, PooledDb } from '#db/client.ts';
import { findPerson, lockPerson, updatePerson, type PersonRow } from '#db/queries/person.ts';
import { writeRecord } from '#server/change-study.ts';
import { notFound, stale } from '#server/errors.ts';

/** A person's version: the millisecond of their latest change, which every write moves. */
export const versionOf = (row: Pick<PersonRow, 'updatedAt'>): number => row.updatedAt.getTime();

const present = (row: PersonRow): Account => ({
  userId: row.id,
  name: row.name,
  email: row.email,
  administrator: row.administrator,
  version: versionOf(row),
});

export async function readAccount(db: Db, userId: string): Promise<Account> {
  const row = await findPerson(db, { userId });
  if (!row) throw notFound();
  return present(row);
}

/** Changes one's own name. @throws AppError 'stale' */
export async function changeName(
  db: PooledDb,
  { userId, version, name }: { userId: string; version: number; name: AccountPatch['name'] },
): Promise<Account> {
  return db.transaction(async (tx) => {
    const row = await lockPerson(tx, { userId });
    if (!row) throw notFound();
    if (versionOf(row) !== version) throw stale(present(row));
    if (row.name === name) return present(row);
    const after = (await updatePerson(tx, { userId, values: { name } })) ?? row;
    await writeRecord(tx, { studyId: null, userId, revision: null }, [
      { object: 'person', objectId: userId, action: 'change', from: { name: row.name }, to: { name } },
    ]);
    return present(after);
  });
}

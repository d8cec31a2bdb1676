import { randomBytes } from 'node:crypto';
import type { MadeKey, PersonalKey, PersonalKeyList } from '#contract/account.ts';
import type { Db, PooledDb } from '#db/client.ts';
import { lockPerson } from '#db/queries/person.ts';
import { countKeys, insertKey, listKeys, revokeKey, type PersonalKeyRow } from '#db/queries/personal-key.ts';
import { sha256Hex, type SignedIn } from '#server/auth/actor.ts';
import { writeRecord } from '#server/change-study.ts';
import { AppError, notFound } from '#server/errors.ts';

export const MOST_KEYS = 20;
const START_LENGTH = 8;

const present = (row: PersonalKeyRow): PersonalKey => ({
  id: row.id,
  name: row.name,
  start: row.start,
  createdAt: row.createdAt.toISOString(),
  lastUsedAt: row.lastUsedAt?.toISOString() ?? null,
});

export async function readKeys(db: Db, userId: string): Promise<PersonalKeyList> {
  const items = (await listKeys(db, { userId })).map(present);
  return { items, total: items.length };
}

/** A key that leaked must not be able to make another that outlives it. */
function requireSession(actor: SignedIn): void {
  if (!actor.sessionToken)
    throw new AppError('forbidden', 'A personal key does not make keys. Sign in and use the account page.');
}

/**
 * Makes a personal key and tells it, this once; only its hash is kept.
 * @throws AppError 'forbidden' to a personal key · 'conflict' at twenty keys
 */
export async function makeKey(db: PooledDb, actor: SignedIn, name: string): Promise<MadeKey> {
  requireSession(actor);
  const { userId } = actor;
  const key = `sw_${randomBytes(30).toString('base64url')}`;
  return db.transaction(async (tx) => {
    await lockPerson(tx, { userId });
    if ((await countKeys(tx, { userId })) >= MOST_KEYS)
      throw new AppError('conflict', `You have ${MOST_KEYS} keys. Revoke one before you make another.`);
    const start = key.slice(0, START_LENGTH);
    const row = await insertKey(tx, { userId, name, start, sha256: sha256Hex(key) });
    await writeRecord(tx, { studyId: null, userId, revision: null }, [
      { object: 'personal-key', objectId: row.id, action: 'add', to: { name, start } },
    ]);
    return { ...present(row), key };
  });
}

/** Makes a key stop working. @throws AppError 'not-found' */
export async function withdrawKey(db: PooledDb, { userId }: SignedIn, keyId: string): Promise<void> {
  await db.transaction(async (tx) => {
    if (!(await revokeKey(tx, { userId, keyId }))) throw notFound('There is no such key.');
    await writeRecord(tx, { studyId: null, userId, revision: null }, [
      { object: 'personal-key', objectId: keyId, action: 'remove' },
    ]);
  });
}

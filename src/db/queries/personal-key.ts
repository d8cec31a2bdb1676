import { and, count, desc, eq, isNull, sql } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { personalKey } from '../schema/auth.ts';

const columns = {
  id: personalKey.id,
  name: personalKey.name,
  start: personalKey.start,
  createdAt: personalKey.createdAt,
  lastUsedAt: personalKey.lastUsedAt,
};
export type PersonalKeyRow = Awaited<ReturnType<typeof listKeys>>[number];

interface OfPerson {
  userId: string;
}

const working = ({ userId }: OfPerson) => and(eq(personalKey.userId, userId), isNull(personalKey.revokedAt));

/** A person's keys that work, latest first. */
export async function listKeys(db: Db, of: OfPerson) {
  return db
    .select(columns)
    .from(personalKey)
    .where(working(of))
    .orderBy(desc(personalKey.createdAt), desc(personalKey.id));
}

export async function countKeys(db: Db, of: OfPerson): Promise<number> {
  const [row] = await db.select({ n: count() }).from(personalKey).where(working(of));
  return row?.n ?? 0;
}

export async function insertKey(db: Db, values: OfPerson & { name: string; start: string; sha256: string }) {
  const [row] = await db.insert(personalKey).values(values).returning(columns);
  if (!row) throw new Error('an insert returned no row');
  return row;
}

/** @returns whether there was such a key */
export async function revokeKey(db: Db, { userId, keyId }: OfPerson & { keyId: string }): Promise<boolean> {
  const revoked = await db
    .update(personalKey)
    .set({ revokedAt: sql`now()` })
    .where(and(working({ userId }), eq(personalKey.id, keyId)))
    .returning({ id: personalKey.id });
  return revoked.length > 0;
}

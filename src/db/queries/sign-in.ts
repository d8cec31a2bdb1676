import { and, desc, eq, lt, sql } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { rateLimit, signInFailure } from '../schema/auth.ts';
import { newId } from '../columns.ts';

/** Holds everyone else's attempts on one address until the transaction ends, so that none is miscounted. */
export async function lockAddress(db: Db, { email }: { email: string }): Promise<void> {
  await db.execute(sql`select pg_advisory_xact_lock(hashtextextended(${`sign-in ${email}`}, 0))`);
}

/** The times of an address's latest failures since an instant, newest first. */
export async function listFailures(
  db: Db,
  { email, since, limit }: { email: string; since: Date; limit: number },
): Promise<Date[]> {
  const rows = await db
    .select({ at: signInFailure.at })
    .from(signInFailure)
    .where(and(eq(signInFailure.email, email), sql`${signInFailure.at} > ${since}`))
    .orderBy(desc(signInFailure.at))
    .limit(limit);
  return rows.map(({ at }) => at);
}

export async function insertFailure(db: Db, values: { email: string; at: Date }): Promise<string> {
  const [row] = await db.insert(signInFailure).values(values).returning({ id: signInFailure.id });
  if (!row) throw new Error('an insert returned no row');
  return row.id;
}

export async function deleteFailure(db: Db, { id }: { id: string }): Promise<void> {
  await db.delete(signInFailure).where(eq(signInFailure.id, id));
}

export async function deleteFailuresBefore(db: Db, { before }: { before: Date }): Promise<void> {
  await db.delete(signInFailure).where(lt(signInFailure.at, before));
}

/**
 * Counts one request in the key's present window, which begins with the first request after the last one ended.
 * One statement, so that simultaneous requests are all counted.
 */
export async function countRequest(
  db: Db,
  { key, nowMs, windowMs }: { key: string; nowMs: number; windowMs: number },
): Promise<{ count: number; startedMs: number }> {
  const over = sql`${rateLimit.lastRequest} <= ${nowMs - windowMs}`;
  const [row] = await db
    .insert(rateLimit)
    .values({ id: newId(), key, count: 1, lastRequest: nowMs })
    .onConflictDoUpdate({
      target: rateLimit.key,
      set: {
        count: sql`case when ${over} then 1 else ${rateLimit.count} + 1 end`,
        lastRequest: sql`case when ${over} then ${nowMs}::bigint else ${rateLimit.lastRequest} end`,
      },
    })
    .returning({ count: rateLimit.count, startedMs: rateLimit.lastRequest });
  if (!row) throw new Error('an upsert returned no row');
  return row;
}

export async function deleteRequestsBefore(db: Db, { beforeMs }: { beforeMs: number }): Promise<void> {
  await db.delete(rateLimit).where(lt(rateLimit.lastRequest, beforeMs));
}

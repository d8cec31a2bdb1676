import { and, desc, eq, isNull, sql } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { ascentRequest } from '../schema/ascent.ts';
import { user } from '../schema/auth.ts';

interface Pair {
  siteId: string;
  orbitId: string;
}
export interface Request extends Pair {
  hash: string;
}

/** Notes that a study asks for flights; one asked for before, or cancelled, is asked for anew. */
export async function writeRequests(
  db: Db,
  {
    studyId,
    userId,
    priority,
    requests,
  }: { studyId: string; userId: string; priority: number; requests: readonly Request[] },
): Promise<void> {
  if (requests.length === 0) return;
  await db.execute(sql`
    insert into ascent_request (study_id, site_id, orbit_id, hash, priority, requested_by)
    select ${studyId}::uuid, "siteId", "orbitId", hash, ${priority}::integer, ${userId}::text
    from jsonb_to_recordset(${JSON.stringify(requests)}::jsonb) as new("siteId" uuid, "orbitId" uuid, hash text)
    on conflict (study_id, site_id, orbit_id, hash) do update set
      requested_at = now(), requested_by = excluded.requested_by, priority = excluded.priority,
      cancelled_at = null`);
}

/** What a study asks for, flown or not, of earlier inputs too. */
export function listLive(db: Db, { studyId }: { studyId: string }): Promise<Request[]> {
  return db
    .select({ siteId: ascentRequest.siteId, orbitId: ascentRequest.orbitId, hash: ascentRequest.hash })
    .from(ascentRequest)
    .where(and(eq(ascentRequest.studyId, studyId), isNull(ascentRequest.cancelledAt)));
}

/** Takes requests back. */
export async function cancelRequests(
  db: Db,
  { studyId, requests }: { studyId: string; requests: readonly Request[] },
): Promise<void> {
  const keys = requests.map(({ siteId, orbitId, hash }) => `${siteId} ${orbitId} ${hash}`);
  const { siteId, orbitId, hash } = ascentRequest;
  await db
    .update(ascentRequest)
    .set({ cancelledAt: sql`now()` })
    .where(
      and(
        eq(ascentRequest.studyId, studyId),
        isNull(ascentRequest.cancelledAt),
        sql`${siteId}::text || ' ' || ${orbitId}::text || ' ' || ${hash} = any(${sql.param(keys)}::text[])`,
      ),
    );
}

/** Those of some flights that any study still asks for. */
export async function stillAskedFor(db: Db, { hashes }: { hashes: readonly string[] }): Promise<Set<string>> {
  const rows = await db
    .selectDistinct({ hash: ascentRequest.hash })
    .from(ascentRequest)
    .where(
      and(
        sql`${ascentRequest.hash} = any(${sql.param([...hashes])}::text[])`,
        isNull(ascentRequest.cancelledAt),
      ),
    );
  return new Set(rows.map(({ hash }) => hash));
}

/** Everything a study ever asked for, latest first, with the name of who did. */
export function listRequests(db: Db, { studyId }: { studyId: string }) {
  return db
    .select({
      siteId: ascentRequest.siteId,
      orbitId: ascentRequest.orbitId,
      hash: ascentRequest.hash,
      requestedAt: ascentRequest.requestedAt,
      requestedBy: user.name,
      cancelledAt: ascentRequest.cancelledAt,
    })
    .from(ascentRequest)
    .innerJoin(user, eq(user.id, ascentRequest.requestedBy))
    .where(eq(ascentRequest.studyId, studyId))
    .orderBy(desc(ascentRequest.requestedAt));
}

/** The studies that ask for any of some flights. */
export async function studiesAskingFor(db: Db, { hashes }: { hashes: readonly string[] }): Promise<string[]> {
  const rows = await db
    .selectDistinct({ studyId: ascentRequest.studyId })
    .from(ascentRequest)
    .where(
      and(
        sql`${ascentRequest.hash} = any(${sql.param([...hashes])}::text[])`,
        isNull(ascentRequest.cancelledAt),
      ),
    );
  return rows.map(({ studyId }) => studyId);
}

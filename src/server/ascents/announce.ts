import { sql } from 'drizzle-orm';
import type { Db, PooledDb } from '#db/client.ts';
import { studiesAskingFor } from '#db/queries/ascent-request.ts';
import { Coalescer } from '#server/events/coalesce.ts';
import { PROGRESS_CHANNEL, type Progress } from '#server/events/listen.ts';

/** A worker that flies hundreds a second still says so twice. */
const EVERY_MS = 500;

/** Tells whoever looks at some studies that their ascents moved on; within a transaction, when it commits. */
export async function announceProgress(db: Db, studyIds: readonly string[]): Promise<void> {
  const payloads = studyIds.map((studyId) => JSON.stringify({ studyId } satisfies Progress));
  await db.execute(
    sql`select pg_notify(${PROGRESS_CHANNEL}, payload) from unnest(${sql.param(payloads)}::text[]) as payload`,
  );
}

/**
 * Announces flights by their hashes, gathered, to every study that asks for them. What cannot be told while the
 * database is away is not missed: whoever listens reads everything again when it is back.
 */
export function progressOf(db: PooledDb): Coalescer {
  return new Coalescer(EVERY_MS, (hashes) => {
    void studiesAskingFor(db, { hashes })
      .then((studyIds) => announceProgress(db, studyIds))
      .catch(() => undefined);
  });
}

import { and, eq, gt, isNotNull, sql } from 'drizzle-orm';
import { record } from '../schema/record.ts';
import { member } from '../schema/study.ts';
import type { Db } from '../client.ts';

/** One line of the record. `from` is null for what was made, `to` for what was removed. */
export interface RecordEntry {
  object: string;
  objectId: string;
  action: string;
  from?: unknown;
  to?: unknown;
}

/** Taken before numbering record lines, so that their numbers appear in the order of commits. */
const RECORD_LOCK = 20_310_401;
const ENTRIES_A_STATEMENT = 2_000;

/**
 * Adds lines to the record, numbered in their order. They travel as one JSON a statement: a parameter for each of
 * ten thousand lines' columns takes several times as long.
 */
export async function insertEntries(
  db: Db,
  {
    studyId,
    userId,
    revision,
    entries,
  }: {
    studyId: string | null;
    userId: string | null;
    revision: number | null;
    entries: readonly RecordEntry[];
  },
): Promise<void> {
  await db.execute(sql`select pg_advisory_xact_lock(${RECORD_LOCK})`);
  for (let i = 0; i < entries.length; i += ENTRIES_A_STATEMENT) {
    const lines = JSON.stringify(entries.slice(i, i + ENTRIES_A_STATEMENT));
    await db.execute(sql`
      insert into record (study_id, user_id, revision, object, object_id, action, "from", "to")
      select ${studyId}::uuid, ${userId}::text, ${revision}::integer, object, "objectId", action, "from", "to"
      from rows from (jsonb_to_recordset(${lines}::jsonb) as (
        object text, "objectId" text, action text, "from" jsonb, "to" jsonb)) with ordinality as new(
        object, "objectId", action, "from", "to", place)
      order by place`);
  }
}

/** What changed after a line of the record, a row a study, in the studies the person is a member of. */
export async function listChangesSince(
  db: Db,
  { userId, studyId, recordId }: { userId: string; studyId: string | null; recordId: number },
) {
  const rows = await db
    .select({
      id: sql<number>`max(${record.id})::float8`,
      studyId: sql<string>`${record.studyId}`,
      revision: sql<number | null>`max(${record.revision})`,
      userId: sql<string | null>`max(${record.userId})`,
      objects: sql<string[]>`array_agg(distinct ${record.object})`,
    })
    .from(record)
    .innerJoin(member, and(eq(member.studyId, record.studyId), eq(member.userId, userId)))
    .where(
      and(
        gt(record.id, recordId),
        isNotNull(record.studyId),
        studyId ? eq(record.studyId, studyId) : undefined,
      ),
    )
    .groupBy(record.studyId);
  return rows.sort((a, b) => a.id - b.id);
}

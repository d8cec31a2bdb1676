import { and, eq, gt, isNotNull, sql } from 'drizzle-orm';
import { record } from '../schema/record.ts';
import { member } from '../schema/study.ts';
import type { Db } from '../client.ts';

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

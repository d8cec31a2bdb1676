import { and, eq } from 'drizzle-orm';
import { member } from '../schema/study.ts';
import type { Db } from '../client.ts';

/** The actor's place in a study; undefined for a stranger and for a study that does not exist. */
export async function findMembership(db: Db, { studyId, userId }: { studyId: string; userId: string }) {
  const [row] = await db
    .select({ id: member.id, studyId: member.studyId, role: member.role })
    .from(member)
    .where(and(eq(member.studyId, studyId), eq(member.userId, userId)));
  return row;
}

import { and, asc, eq, isNotNull } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { user } from '../schema/auth.ts';
import { member, study } from '../schema/study.ts';

/** What a memo's head is made from: the study's words and the names of its leads. */
export async function findMemoHead(db: Db, { studyId }: { studyId: string }) {
  const [head] = await db
    .select({
      id: study.id,
      title: study.title,
      organisation: study.organisation,
      question: study.question,
      decideBy: study.decideBy,
    })
    .from(study)
    .where(eq(study.id, studyId));
  if (!head) return undefined;
  const leads = await db
    .select({ name: user.name })
    .from(member)
    .innerJoin(user, eq(user.id, member.userId))
    .where(and(eq(member.studyId, studyId), eq(member.role, 'lead'), isNotNull(member.userId)))
    .orderBy(asc(user.name), asc(user.id));
  return { ...head, leads: leads.map(({ name }) => name) };
}

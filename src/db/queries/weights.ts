import { and, asc, eq, isNull, ne, sql } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { user } from '../schema/auth.ts';
import { criterion, criterionGroup, weightSet } from '../schema/criterion.ts';
import { member } from '../schema/study.ts';

const columns = {
  method: weightSet.method,
  points: weightSet.points,
  order: weightSet.order,
  judgements: weightSet.judgements,
  shared: weightSet.shared,
  origin: weightSet.origin,
  reason: weightSet.reason,
  version: weightSet.version,
  updatedAt: weightSet.updatedAt,
};

/** A set of a study: a member's own, or the study's where no person is named. */
interface WhichSet {
  studyId: string;
  userId: string | null;
}

const which = ({ studyId, userId }: WhichSet) =>
  and(
    eq(weightSet.studyId, studyId),
    userId === null ? isNull(weightSet.userId) : eq(weightSet.userId, userId),
  );

export async function findWeights(db: Db, set: WhichSet) {
  const [row] = await db
    .select({ id: weightSet.id, ...columns })
    .from(weightSet)
    .where(which(set));
  return row;
}

/** What a set says, whole. */
export type WeightSetValues = Pick<
  typeof weightSet.$inferInsert,
  'method' | 'points' | 'order' | 'judgements' | 'shared' | 'origin' | 'reason'
>;

/** Writes a set whole; the first write makes it, at version 1. */
export async function writeWeights(
  db: Db,
  { studyId, userId, id, values }: WhichSet & { id: string | null; values: WeightSetValues },
) {
  const [row] =
    id === null
      ? await db
          .insert(weightSet)
          .values({ ...values, studyId, userId })
          .returning({ id: weightSet.id, ...columns })
      : await db
          .update(weightSet)
          .set({ ...values, version: sql`${weightSet.version} + 1`, updatedAt: sql`now()` })
          .where(and(which({ studyId, userId }), eq(weightSet.id, id)))
          .returning({ id: weightSet.id, ...columns });
  if (!row) throw new Error('a set of weights was written and not returned');
  return row;
}

/** A study's weighed criteria in their order, each with the group it is weighed in. */
export function listWeighed(db: Db, { studyId }: { studyId: string }) {
  return db
    .select({ id: criterion.id, groupId: criterion.groupId, name: criterion.name })
    .from(criterion)
    .where(and(eq(criterion.studyId, studyId), ne(criterion.source, 'text')))
    .orderBy(asc(criterion.position));
}

export function listGroupNames(db: Db, { studyId }: { studyId: string }) {
  return db
    .select({ id: criterionGroup.id, name: criterionGroup.name })
    .from(criterionGroup)
    .where(eq(criterionGroup.studyId, studyId));
}

/** Everyone who may weigh, leads first, then by name, each with the set of their own or null. */
export function listMemberSets(db: Db, { studyId }: { studyId: string }) {
  return db
    .select({ userId: user.id, name: user.name, role: member.role, set: columns })
    .from(member)
    .innerJoin(user, eq(user.id, member.userId))
    .leftJoin(weightSet, and(eq(weightSet.studyId, member.studyId), eq(weightSet.userId, user.id)))
    .where(and(eq(member.studyId, studyId), ne(member.role, 'reader')))
    .orderBy(asc(member.role), asc(sql`lower(${user.name})`), asc(member.id));
}

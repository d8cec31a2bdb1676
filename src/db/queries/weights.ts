import { and, eq, isNull, sql } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { weightSet } from '../schema/criterion.ts';

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

/** Writes a set whole; the first write makes it, at version 1. */
export async function writeWeights(
  db: Db,
  { studyId, userId, id, points }: WhichSet & { id: string | null; points: Record<string, number> },
) {
  const [row] =
    id === null
      ? await db
          .insert(weightSet)
          .values({ studyId, userId, points })
          .returning({ id: weightSet.id, ...columns })
      : await db
          .update(weightSet)
          .set({ points, version: sql`${weightSet.version} + 1`, updatedAt: sql`now()` })
          .where(and(which({ studyId, userId }), eq(weightSet.id, id)))
          .returning({ id: weightSet.id, ...columns });
  if (!row) throw new Error('a set of weights was written and not returned');
  return row;
}

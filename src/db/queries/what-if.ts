import { and, count, desc, eq, ilike, or, sql, type SQL } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { user } from '../schema/auth.ts';
import { whatIf } from '../schema/criterion.ts';

const columns = {
  id: whatIf.id,
  studyId: whatIf.studyId,
  userId: whatIf.userId,
  name: whatIf.name,
  shared: whatIf.shared,
  changes: whatIf.changes,
  version: whatIf.version,
  createdAt: whatIf.createdAt,
  updatedAt: whatIf.updatedAt,
};

type Bare = Pick<typeof whatIf.$inferSelect, keyof typeof columns>;
/** A what-if with the name of whoever made it. */
export type WhatIfRow = Bare & { by: string };
export type WhatIfFields = Pick<typeof whatIf.$inferInsert, 'name' | 'shared' | 'changes'>;

/** Who asks: a private what-if is its maker's alone to see. */
interface SeenBy {
  studyId: string;
  userId: string;
}

const seenBy = ({ studyId, userId }: SeenBy): SQL | undefined =>
  and(eq(whatIf.studyId, studyId), or(eq(whatIf.userId, userId), eq(whatIf.shared, true)));

/** One page of a person's own what-ifs and the shared ones, latest change first. */
export async function listWhatIfs(
  db: Db,
  { query, page, pageSize, ...who }: SeenBy & { query: string; page: number; pageSize: number },
): Promise<{ items: WhatIfRow[]; total: number }> {
  const like = `%${query.replace(/[\\%_]/g, '\\$&')}%`;
  const sought = and(
    seenBy(who),
    query === '' ? undefined : or(ilike(whatIf.name, like), ilike(user.name, like)),
  );
  const items = await db
    .select({ ...columns, by: user.name })
    .from(whatIf)
    .innerJoin(user, eq(user.id, whatIf.userId))
    .where(sought)
    .orderBy(desc(whatIf.updatedAt), desc(whatIf.id))
    .limit(pageSize)
    .offset((page - 1) * pageSize);
  const [row] = await db
    .select({ n: count() })
    .from(whatIf)
    .innerJoin(user, eq(user.id, whatIf.userId))
    .where(sought);
  return { items, total: row?.n ?? 0 };
}

export async function findWhatIf(
  db: Db,
  { whatIfId, ...who }: SeenBy & { whatIfId: string },
): Promise<WhatIfRow | undefined> {
  const [row] = await db
    .select({ ...columns, by: user.name })
    .from(whatIf)
    .innerJoin(user, eq(user.id, whatIf.userId))
    .where(and(seenBy(who), eq(whatIf.id, whatIfId)));
  return row;
}

export async function countOwnWhatIfs(db: Db, { studyId, userId }: SeenBy): Promise<number> {
  const [row] = await db
    .select({ n: count() })
    .from(whatIf)
    .where(and(eq(whatIf.studyId, studyId), eq(whatIf.userId, userId)));
  return row?.n ?? 0;
}

export async function insertWhatIf(
  db: Db,
  { studyId, userId, values }: SeenBy & { values: WhatIfFields },
): Promise<Bare> {
  const [row] = await db
    .insert(whatIf)
    .values({ ...values, studyId, userId })
    .returning(columns);
  if (!row) throw new Error('an insert returned no row');
  return row;
}

/** Its maker's alone: writes a what-if and moves its version. */
export async function updateWhatIf(
  db: Db,
  { studyId, userId, whatIfId, values }: SeenBy & { whatIfId: string; values: Partial<WhatIfFields> },
): Promise<Bare | undefined> {
  const [row] = await db
    .update(whatIf)
    .set({ ...values, version: sql`${whatIf.version} + 1`, updatedAt: sql`now()` })
    .where(and(eq(whatIf.studyId, studyId), eq(whatIf.userId, userId), eq(whatIf.id, whatIfId)))
    .returning(columns);
  return row;
}

/** Its maker's alone. */
export async function deleteWhatIf(
  db: Db,
  { studyId, userId, whatIfId }: SeenBy & { whatIfId: string },
): Promise<void> {
  await db
    .delete(whatIf)
    .where(and(eq(whatIf.studyId, studyId), eq(whatIf.userId, userId), eq(whatIf.id, whatIfId)));
}

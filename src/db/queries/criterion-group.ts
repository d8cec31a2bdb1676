import { and, asc, eq, sql } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { criterion, criterionGroup } from '../schema/criterion.ts';

export type GroupRow = typeof criterionGroup.$inferSelect;

const columns = {
  id: criterionGroup.id,
  studyId: criterionGroup.studyId,
  name: criterionGroup.name,
  nameKey: criterionGroup.nameKey,
  version: criterionGroup.version,
};

interface InStudy {
  studyId: string;
}
type OneGroup = InStudy & { groupId: string };
type Named = Pick<GroupRow, 'name' | 'nameKey'>;

const one = ({ studyId, groupId }: OneGroup) =>
  and(eq(criterionGroup.studyId, studyId), eq(criterionGroup.id, groupId));

/** A study's groups in the order they were made. */
export function listGroups(db: Db, { studyId }: InStudy): Promise<GroupRow[]> {
  return db
    .select(columns)
    .from(criterionGroup)
    .where(eq(criterionGroup.studyId, studyId))
    .orderBy(asc(criterionGroup.id));
}

export async function findGroup(db: Db, which: OneGroup): Promise<GroupRow | undefined> {
  const [row] = await db.select(columns).from(criterionGroup).where(one(which));
  return row;
}

export async function insertGroup(
  db: Db,
  { studyId, values }: InStudy & { values: Named },
): Promise<GroupRow> {
  const [row] = await db
    .insert(criterionGroup)
    .values({ ...values, studyId })
    .returning(columns);
  if (!row) throw new Error('an insert returned no row');
  return row;
}

/** Writes a group's name and moves its version. */
export async function updateGroup(
  db: Db,
  { values, ...which }: OneGroup & { values: Named },
): Promise<GroupRow | undefined> {
  const [row] = await db
    .update(criterionGroup)
    .set({ ...values, version: sql`${criterionGroup.version} + 1` })
    .where(one(which))
    .returning(columns);
  return row;
}

/** Takes a group away; its criteria stand by themselves from then on. @returns their ids */
export async function deleteGroup(db: Db, which: OneGroup): Promise<string[]> {
  const { studyId, groupId } = which;
  const freed = await db
    .update(criterion)
    .set({ groupId: null, version: sql`${criterion.version} + 1` })
    .where(and(eq(criterion.studyId, studyId), eq(criterion.groupId, groupId)))
    .returning({ id: criterion.id });
  await db.delete(criterionGroup).where(one(which));
  return freed.map(({ id }) => id);
}

import { eq } from 'drizzle-orm';
import { CriterionInput } from '#contract/criterion.ts';
import type { PooledDb } from '#db/client.ts';
import { criterion, criterionGroup } from '#db/schema/criterion.ts';
import { addCriterion } from '#server/criteria/add-criterion.ts';
import type { Member } from '#server/member.ts';

/**
 * Adds entered criteria named A, B, C… to a study. @returns ids by letter, as many as were asked for.
 * @param from how many letters are taken already; their places in the answer are empty.
 */
export async function criteriaOf(
  db: PooledDb,
  member: Member,
  count: number,
  from = 0,
): Promise<[string, string, string, ...string[]]> {
  const ids: string[] = Array.from({ length: from }, () => '');
  for (let k = from; k < from + count; k++) {
    const name = String.fromCharCode('A'.charCodeAt(0) + k);
    const input = CriterionInput.parse({ source: 'entered', name, direction: 'more' });
    ids.push((await addCriterion(db, { member, input })).id);
  }
  return ids as [string, string, string, ...string[]];
}

/** Makes a group of criteria. @returns its id. */
export async function groupOf(db: PooledDb, { studyId }: Member, name: string): Promise<string> {
  const [row] = await db
    .insert(criterionGroup)
    .values({ studyId, name, nameKey: name.toLowerCase() })
    .returning({ id: criterionGroup.id });
  if (!row) throw new Error('no group was made');
  return row.id;
}

export async function intoGroup(db: PooledDb, groupId: string, ids: readonly string[]): Promise<void> {
  for (const id of ids) await db.update(criterion).set({ groupId }).where(eq(criterion.id, id));
}

import type { PooledDb } from '#db/client.ts';
import { newId } from '#db/columns.ts';
import { user } from '#db/schema/auth.ts';
import { member, study } from '#db/schema/study.ts';
import type { StudyRole } from '#server/access.ts';
import type { Member } from '#server/member.ts';

/** A person with an account. */
export async function person(db: PooledDb, name = 'Ada Quill'): Promise<{ userId: string; name: string }> {
  const userId = newId();
  await db.insert(user).values({ id: userId, name, email: `${userId}@spinward.test` });
  return { userId, name };
}

/** A further member of a study. */
export async function joined(
  db: PooledDb,
  { studyId, role, name }: { studyId: string; role: StudyRole; name?: string },
): Promise<Member> {
  const who = await person(db, name);
  const memberId = newId();
  const email = `${who.userId}@spinward.test`;
  await db.insert(member).values({ id: memberId, studyId, email, userId: who.userId, role });
  return { memberId, studyId, role, ...who };
}

/** A study of its own with one member in it. */
export async function studyWith(
  db: PooledDb,
  role: StudyRole,
  fields: Partial<typeof study.$inferInsert> = {},
): Promise<Member> {
  const maker = await person(db, 'Maker');
  const [made] = await db
    .insert(study)
    .values({ title: 'Trial', createdBy: maker.userId, ...fields })
    .returning({ id: study.id });
  if (!made) throw new Error('no study was made');
  return joined(db, { studyId: made.id, role });
}

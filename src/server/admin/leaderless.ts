import type { LeaderlessList, LeaderlessStudy, NewLead } from '#contract/admin.ts';
import type { ListQuery } from '#contract/list.ts';
import type { Db, PooledDb } from '#db/client.ts';
import { findRevision, insertMember, updateMemberRole } from '#db/queries/member.ts';
import { findPerson, listLeaderless, listStudyPeople } from '#db/queries/person.ts';
import { lockStudy } from '#db/queries/study.ts';
import type { SignedIn } from '#server/auth/actor.ts';
import { writeRecord } from '#server/change-study.ts';
import { AppError, notFound } from '#server/errors.ts';

async function membersOf(db: Db, studyId: string): Promise<LeaderlessStudy['members']> {
  const people = await listStudyPeople(db, { studyId });
  return people.map(({ userId, name, email, role, deactivatedAt }) => ({
    userId,
    name,
    email,
    role,
    active: deactivatedAt === null,
  }));
}

/** Studies no active lead can reach, by their members: what they hold is not an administrator's to see. */
export async function readLeaderless(
  db: Db,
  query: Pick<ListQuery, 'page' | 'pageSize'>,
): Promise<LeaderlessList> {
  const { rows, total } = await listLeaderless(db, query);
  const items = await Promise.all(
    rows.map(async ({ studyId, createdAt }) => ({
      studyId,
      createdAt: createdAt.toISOString(),
      members: await membersOf(db, studyId),
    })),
  );
  return { items, total };
}

async function refuseLed(tx: Db, studyId: string): Promise<void> {
  const people = await listStudyPeople(tx, { studyId });
  if (people.some((one) => one.role === 'lead' && one.deactivatedAt === null))
    throw notFound('There is no such study without an active lead.');
}

async function makeLead(tx: Db, { studyId, userId }: NewLead, email: string, addedBy: string) {
  const people = await listStudyPeople(tx, { studyId });
  const present = people.find((one) => one.userId === userId);
  if (!present) {
    const id = await insertMember(tx, { studyId, email, userId, role: 'lead', addedBy });
    return { objectId: id, action: 'add', to: { email, role: 'lead' } };
  }
  await updateMemberRole(tx, { studyId, memberId: present.memberId, role: 'lead' });
  const [from, to] = [
    { email, role: present.role },
    { email, role: 'lead' },
  ];
  return { objectId: present.memberId, action: 'change', from, to };
}

/**
 * Names a lead for a study that has no active one. The study's record says who did.
 * @throws AppError 'not-found' for any other study, so that one learns nothing of it · 'conflict'
 */
export async function nameLead(db: PooledDb, actor: SignedIn, input: NewLead): Promise<void> {
  const { studyId, userId } = input;
  await db.transaction(async (tx) => {
    if (!(await lockStudy(tx, { studyId }))) throw notFound('There is no such study without an active lead.');
    await refuseLed(tx, studyId);
    const person = await findPerson(tx, { userId });
    if (!person || person.deactivatedAt)
      throw new AppError('conflict', 'A lead has to have an active account. Nothing was changed.');
    const entry = await makeLead(tx, input, person.email, actor.userId);
    const revision = (await findRevision(tx, { studyId })) ?? null;
    await writeRecord(tx, { studyId, userId: actor.userId, revision }, [{ object: 'member', ...entry }]);
  });
}

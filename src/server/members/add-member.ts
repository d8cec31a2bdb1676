import type { MemberInput, StudyMember } from '#contract/member.ts';
import type { PooledDb } from '#db/client.ts';
import { findAccountByEmail, findMember, findMemberByEmail, insertMember } from '#db/queries/member.ts';
import { changeStudy, type Saved } from '#server/change-study.ts';
import { AppError } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { presentMember, recordedMember } from './present.ts';

/**
 * Adds someone by address. An address without an account becomes a pending member: the administrator sees it among
 * the requests for an invitation, and the membership counts from the day the account is made.
 * @throws AppError 'conflict' where the address is in the study already
 */
export async function addMember(
  db: PooledDb,
  { member, input }: { member: Member; input: MemberInput },
): Promise<StudyMember & Saved> {
  const { studyId, userId } = member;
  return changeStudy(db, { member, kind: 'apart' }, async (tx) => {
    if (await findMemberByEmail(tx, { studyId, email: input.email }))
      throw new AppError('conflict', `${input.email} is in this study already. Change the role there.`);
    const account = await findAccountByEmail(tx, { email: input.email });
    const memberId = await insertMember(tx, {
      studyId,
      ...input,
      userId: account?.id ?? null,
      addedBy: userId,
    });
    const row = await findMember(tx, { studyId, memberId });
    if (!row) throw new Error(`member ${memberId} was made and not found`);
    return {
      result: presentMember(row, userId),
      entries: [{ object: 'member', objectId: memberId, action: 'add', to: recordedMember(row) }],
    };
  });
}

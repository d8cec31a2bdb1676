import type { PooledDb } from '#db/client.ts';
import { deleteMember, findMember } from '#db/queries/member.ts';
import { changeStudy, type Saved } from '#server/change-study.ts';
import { AppError, notFound, stale } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { refuseLastLead } from './last-lead.ts';
import { presentMember, recordedMember } from './present.ts';

interface RemoveRequest {
  member: Member;
  memberId: string;
  /** The version the removal is based on. */
  version: number;
}

/**
 * Takes someone out of the study: a lead anyone, everyone else themselves. What they did stays in the record. One may
 * leave an archived study too. @throws AppError 'forbidden' · 'stale' · 'conflict' where the last lead would go
 */
export async function removeMember(
  db: PooledDb,
  { member, memberId, version }: RemoveRequest,
): Promise<Saved> {
  const { studyId, userId } = member;
  const leaves = memberId === member.memberId;
  if (!leaves && member.role !== 'lead')
    throw new AppError('forbidden', 'A lead removes members. Nothing was changed.');
  return changeStudy(db, { member, kind: 'apart', allowArchived: leaves }, async (tx) => {
    const row = await findMember(tx, { studyId, memberId });
    if (!row) throw notFound('There is no such member in this study.');
    if (row.version !== version) throw stale(presentMember(row, userId));
    await refuseLastLead(tx, { studyId, row });
    await deleteMember(tx, { studyId, memberId });
    const action = leaves ? 'leave' : 'remove';
    return {
      result: {},
      entries: [{ object: 'member', objectId: memberId, action, from: recordedMember(row) }],
    };
  });
}

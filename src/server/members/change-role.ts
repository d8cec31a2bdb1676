import type { MemberPatch, StudyMember } from '#contract/member.ts';
import type { PooledDb } from '#db/client.ts';
import { findMember, updateMemberRole } from '#db/queries/member.ts';
import { changeStudy, type Saved } from '#server/change-study.ts';
import { notFound, stale } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { refuseLastLead } from './last-lead.ts';
import { presentMember } from './present.ts';

interface RoleRequest {
  member: Member;
  memberId: string;
  /** The version the change is based on. */
  version: number;
  role: MemberPatch['role'];
}

/** Gives a member another role. @throws AppError 'stale' · 'conflict' where the last lead would be none */
export async function changeRole(
  db: PooledDb,
  { member, memberId, version, role }: RoleRequest,
): Promise<StudyMember & Saved> {
  const { studyId, userId } = member;
  return changeStudy(db, { member, kind: 'apart' }, async (tx) => {
    const row = await findMember(tx, { studyId, memberId });
    if (!row) throw notFound('There is no such member in this study.');
    if (row.version !== version) throw stale(presentMember(row, userId));
    if (row.role === role) return { result: presentMember(row, userId), entries: [] };
    await refuseLastLead(tx, { studyId, row });
    await updateMemberRole(tx, { studyId, memberId, role });
    const after = (await findMember(tx, { studyId, memberId })) ?? row;
    const from = { email: row.email, role: row.role };
    const to = { email: row.email, role };
    return {
      result: presentMember(after, userId),
      entries: [{ object: 'member', objectId: memberId, action: 'change', from, to }],
    };
  });
}

import type { StudyMember } from '#contract/member.ts';
import type { MemberRow } from '#db/queries/member.ts';

function standingOf({ userId, deactivatedAt }: MemberRow): StudyMember['standing'] {
  if (userId === null) return 'pending';
  return deactivatedAt === null ? 'active' : 'deactivated';
}

/** A member as the person asking sees it. */
export function presentMember(row: MemberRow, askedBy: string): StudyMember {
  return {
    id: row.id,
    email: row.email,
    name: row.name,
    role: row.role,
    standing: standingOf(row),
    you: row.userId === askedBy,
    addedAt: row.createdAt.toISOString(),
    version: row.version,
  };
}

/** What the record keeps of a member. */
export const recordedMember = ({ email, role, userId }: Pick<MemberRow, 'email' | 'role' | 'userId'>) => ({
  email,
  role,
  userId,
});

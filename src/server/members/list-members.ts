import type { ListQuery } from '#contract/list.ts';
import type { MemberList } from '#contract/member.ts';
import type { Db } from '#db/client.ts';
import { listMembers as listRows } from '#db/queries/member.ts';
import type { Member } from '#server/member.ts';
import { presentMember } from './present.ts';

/** A study's members and those who wait for an account, leads first. */
export async function listMembers(
  db: Db,
  { member, ...query }: ListQuery & { member: Member },
): Promise<MemberList> {
  const { rows, total } = await listRows(db, { studyId: member.studyId, ...query });
  return { items: rows.map((row) => presentMember(row, member.userId)), total };
}

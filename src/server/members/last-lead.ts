import type { Db } from '#db/client.ts';
import { countOtherLeads, type MemberRow } from '#db/queries/member.ts';
import { AppError } from '#server/errors.ts';

/**
 * A study keeps a lead with a working account. Call it with the study's row locked, so that two leads who leave at
 * once are not both the second-last. @throws AppError 'conflict'
 */
export async function refuseLastLead(
  tx: Db,
  { studyId, row }: { studyId: string; row: MemberRow },
): Promise<void> {
  const leads = row.role === 'lead' && row.userId !== null && row.deactivatedAt === null;
  if (!leads || (await countOtherLeads(tx, { studyId, memberId: row.id })) > 0) return;
  throw new AppError(
    'conflict',
    'A study keeps a lead, and this is the last one. Make someone else lead first. Nothing was changed.',
  );
}

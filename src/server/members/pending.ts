import type { Db } from '#db/client.ts';
import { bindMembers, findRevision, listPendingAddresses } from '#db/queries/member.ts';
import { writeRecord } from '#server/change-study.ts';

/**
 * Gives the studies that waited for an address to its new account. Call it in the transaction that makes the account;
 * each study's record says so.
 */
export async function bindPendingMemberships(
  tx: Db,
  { userId, email }: { userId: string; email: string },
): Promise<void> {
  const address = email.toLowerCase();
  for (const { memberId, studyId, role } of await bindMembers(tx, { userId, email: address })) {
    const revision = (await findRevision(tx, { studyId })) ?? null;
    await writeRecord(tx, { studyId, userId, revision }, [
      {
        object: 'member',
        objectId: memberId,
        action: 'join',
        from: { email: address, role, userId: null },
        to: { email: address, role, userId },
      },
    ]);
  }
}

/** An address a lead made a member before it had an account: the administrator may invite it. */
export interface InvitationRequest {
  email: string;
  /** ISO 8601, UTC. */
  since: string;
  /** In how many studies; which ones is not the administrator's to see. */
  studies: number;
  askedBy: string | null;
}

/** The requests for an invitation: pending members without an account, longest waiting first. */
export async function listInvitationRequests(db: Db): Promise<InvitationRequest[]> {
  const rows = await listPendingAddresses(db);
  return rows.map(({ email, since, studies, askedBy }) => ({
    email,
    since: since.toISOString(),
    studies,
    askedBy,
  }));
}

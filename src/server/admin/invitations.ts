import { randomBytes } from 'node:crypto';
import type { Invitation, InvitationInput, InvitationList } from '#contract/admin.ts';
import type { ListQuery } from '#contract/list.ts';
import type { Db, PooledDb } from '#db/client.ts';
import {
  insertInvitation,
  listInvitations,
  revokeInvitation,
  revokeInvitationsOf,
} from '#db/queries/invitation.ts';
import { findPersonByEmail } from '#db/queries/person.ts';
import { sha256Hex, type SignedIn } from '#server/auth/actor.ts';
import { writeRecord } from '#server/change-study.ts';
import { env, publicOrigin } from '#server/env.ts';
import { AppError, notFound } from '#server/errors.ts';
import { invitationLetter } from '#server/mail/letters.ts';
import { queueMail } from '#server/mail/queue-mail.ts';
import { listInvitationRequests } from '#server/members/pending.ts';

const VALID_MS = 7 * 24 * 60 * 60 * 1000;

/** The invitations that are still open, and the addresses for which leads ask one. */
export async function readInvitations(
  db: Db,
  query: Pick<ListQuery, 'page' | 'pageSize'>,
): Promise<InvitationList> {
  const now = new Date();
  const { rows, total } = await listInvitations(db, query);
  const items = rows.map((row) => ({
    ...row,
    createdAt: row.createdAt.toISOString(),
    expiresAt: row.expiresAt.toISOString(),
    expired: row.expiresAt <= now,
  }));
  return { items, total, requests: await listInvitationRequests(db) };
}

async function refuseKnown(tx: Db, email: string): Promise<void> {
  const known = await findPersonByEmail(tx, { email });
  if (!known) return;
  throw new AppError(
    'conflict',
    known.deactivatedAt
      ? `${email} has a deactivated account. Activate it again instead.`
      : `${email} has an account already.`,
  );
}

/**
 * Invites an address: a link that works once, for a week, goes there by mail. An earlier link to the same address
 * stops working. @throws AppError 'conflict' where the address has an account
 */
export async function invite(db: PooledDb, actor: SignedIn, input: InvitationInput): Promise<Invitation> {
  const { email, administrator } = input;
  const token = randomBytes(32).toString('base64url');
  const createdAt = new Date();
  const expiresAt = new Date(createdAt.getTime() + VALID_MS);
  return db.transaction(async (tx) => {
    await refuseKnown(tx, email);
    await revokeInvitationsOf(tx, { email });
    const sha256 = sha256Hex(token);
    const values = { email, administrator, sha256, invitedBy: actor.userId, createdAt, expiresAt };
    const id = await insertInvitation(tx, values);
    const link = `${publicOrigin(env())}/invitation/${token}`;
    await queueMail(tx, invitationLetter({ to: email, invitedBy: actor.name, link, expiresAt }));
    await writeRecord(tx, { studyId: null, userId: actor.userId, revision: null }, [
      { object: 'invitation', objectId: id, action: 'add', to: { email, administrator } },
    ]);
    const [created, expires] = [createdAt.toISOString(), expiresAt.toISOString()];
    return {
      id,
      email,
      administrator,
      invitedBy: actor.name,
      createdAt: created,
      expiresAt: expires,
      expired: false,
    };
  });
}

/** Makes an invitation's link stop working. @throws AppError 'not-found' */
export async function withdrawInvitation(db: PooledDb, actor: SignedIn, id: string): Promise<void> {
  await db.transaction(async (tx) => {
    const email = await revokeInvitation(tx, { id });
    if (!email) throw notFound('There is no such open invitation.');
    await writeRecord(tx, { studyId: null, userId: actor.userId, revision: null }, [
      { object: 'invitation', objectId: id, action: 'remove', from: { email } },
    ]);
  });
}

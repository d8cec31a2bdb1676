import type { Acceptance } from '#contract/account.ts';
import type { Db, PooledDb } from '#db/client.ts';
import { findInvitation, lockInvitation, markAccepted, type InvitationRow } from '#db/queries/invitation.ts';
import { findPersonByEmail } from '#db/queries/person.ts';
import { auth } from '#server/auth/auth.ts';
import { sha256Hex } from '#server/auth/actor.ts';
import { makePerson } from '#server/auth/make-person.ts';
import { writeRecord } from '#server/change-study.ts';
import { AppError } from '#server/errors.ts';

const usable = (row: InvitationRow | undefined, now: Date): row is InvitationRow =>
  row !== undefined && !row.acceptedAt && !row.revokedAt && row.expiresAt > now;

/** What the page of a link shows: the invited address (null: the holder names it), or that the link is dead. */
export type InvitationView =
  { usable: false } | { usable: true; email: string | null; administrator: boolean };

export async function readInvitation(db: Db, token: string): Promise<InvitationView> {
  const row = await findInvitation(db, { sha256: sha256Hex(token) });
  if (!usable(row, new Date())) return { usable: false };
  return { usable: true, email: row.email, administrator: row.administrator };
}

function addressFor(row: InvitationRow, input: Acceptance): string {
  const email = row.email ?? input.email;
  if (!email)
    throw new AppError('invalid', 'Some of the input does not fit. Nothing was saved.', {
      errors: [{ path: 'email', message: 'Give a mail address to sign in with.' }],
    });
  return email;
}

/** @throws AppError 'gone' · 'conflict' · 'invalid' */
async function accept(tx: Db, token: string, input: Acceptance): Promise<string> {
  const row = await lockInvitation(tx, { sha256: sha256Hex(token) });
  if (!usable(row, new Date()))
    throw new AppError('gone', 'The invitation is used up or out of date. Ask for a new one.');
  const email = addressFor(row, input);
  if (await findPersonByEmail(tx, { email }))
    throw new AppError('conflict', `${email} has an account already. Sign in with it.`);
  const { name, password } = input;
  const userId = await makePerson(tx, { email, name, password, administrator: row.administrator });
  await markAccepted(tx, { id: row.id });
  const to = { name, email, administrator: row.administrator };
  await writeRecord(tx, { studyId: null, userId, revision: null }, [
    { object: 'person', objectId: userId, action: 'add', to },
  ]);
  return email;
}

/** Makes the invited person's account and signs them in. @returns the cookies of their session */
export async function acceptInvitation(db: PooledDb, token: string, input: Acceptance): Promise<string[]> {
  const email = await db.transaction((tx) => accept(tx, token, input));
  const { headers } = await auth().api.signInEmail({
    body: { email, password: input.password },
    returnHeaders: true,
  });
  return headers.getSetCookie();
}

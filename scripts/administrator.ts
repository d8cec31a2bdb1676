import { and, isNull } from 'drizzle-orm';
import type { Db, PooledDb } from '#db/client.ts';
import { insertInvitation, revokeInvitationsOf } from '#db/queries/invitation.ts';
import { findPersonByEmail, updatePerson } from '#db/queries/person.ts';
import { invitation } from '#db/schema/auth.ts';
import { sha256Hex } from '#server/auth/actor.ts';
import { writeRecord } from '#server/change-study.ts';
import { randomSecret } from './private-files.ts';

const VALID_MS = 24 * 60 * 60 * 1000;
const BY_COMMAND = { studyId: null, userId: null, revision: null };

/** A one-time address that makes an administrator; only its hash is kept. */
async function makeLink(db: Db, origin: string, email: string | null): Promise<string> {
  const token = randomSecret();
  const expiresAt = new Date(Date.now() + VALID_MS);
  await insertInvitation(db, { email, administrator: true, sha256: sha256Hex(token), expiresAt });
  return `${origin}/invitation/${token}`;
}

/** The first administrator's link; links of earlier starts, which nobody used, stop working. */
export function firstAdministrator(db: PooledDb, origin: string): Promise<string> {
  return db.transaction(async (tx) => {
    const unused = and(isNull(invitation.email), isNull(invitation.acceptedAt), isNull(invitation.revokedAt));
    await tx.update(invitation).set({ revokedAt: new Date() }).where(unused);
    return makeLink(tx, origin, null);
  });
}

/**
 * Makes the person of an address an administrator, or gives the link that will.
 * @returns what to tell whoever ran the command
 */
export function anotherAdministrator(db: PooledDb, origin: string, address: string): Promise<string> {
  const email = address.trim().toLowerCase();
  return db.transaction(async (tx) => {
    const person = await findPersonByEmail(tx, { email });
    if (person?.deactivatedAt)
      throw new Error(`${email} is deactivated. An administrator can activate the account again.`);
    if (!person) {
      await revokeInvitationsOf(tx, { email });
      const link = await makeLink(tx, origin, email);
      return `This link makes ${email} an administrator. It works once, for a day:\n  ${link}`;
    }
    if (person.administrator) return `${email} is an administrator already.`;
    await updatePerson(tx, { userId: person.id, values: { administrator: true } });
    const change = { from: { administrator: false }, to: { administrator: true } };
    await writeRecord(tx, BY_COMMAND, [
      { object: 'person', objectId: person.id, action: 'change', ...change },
    ]);
    return `${email} has an account and is an administrator now.`;
  });
}

import { and, eq, isNull } from 'drizzle-orm';
import type { Db } from '#db/client.ts';
import { invitation, user } from '#db/schema/auth.ts';
import { sha256Hex } from '#server/auth/actor.ts';
import { randomSecret } from './private-files.ts';

const VALID_MS = 24 * 60 * 60 * 1000;

/** A one-time address that makes an administrator; only its hash is kept. */
async function makeLink(db: Db, origin: string, email: string | null): Promise<string> {
  const token = randomSecret();
  const expiresAt = new Date(Date.now() + VALID_MS);
  await db.insert(invitation).values({ email, administrator: true, sha256: sha256Hex(token), expiresAt });
  return `${origin}/invitation/${token}`;
}

/** The first administrator's link; links of earlier starts, which nobody used, stop working. */
export async function firstAdministrator(db: Db, origin: string): Promise<string> {
  const unused = and(isNull(invitation.email), isNull(invitation.acceptedAt), isNull(invitation.revokedAt));
  await db.update(invitation).set({ revokedAt: new Date() }).where(unused);
  return makeLink(db, origin, null);
}

/** Makes the person of an address an administrator, or gives the link that will. @returns what to tell */
export async function anotherAdministrator(db: Db, origin: string, email: string): Promise<string> {
  const address = email.trim().toLowerCase();
  const raised = await db
    .update(user)
    .set({ administrator: true })
    .where(and(eq(user.email, address), isNull(user.deactivatedAt)))
    .returning({ id: user.id });
  if (raised.length) return `${address} has an account and is an administrator now.`;
  const [known] = await db.select({ id: user.id }).from(user).where(eq(user.email, address));
  if (known) throw new Error(`${address} is deactivated. An administrator can activate the account again.`);
  const link = await makeLink(db, origin, address);
  return `This link makes ${address} an administrator. It works once, for a day:\n  ${link}`;
}

import { createHash } from 'node:crypto';
import { and, eq, isNull, sql } from 'drizzle-orm';
import type { Db } from '#db/client.ts';
import { personalKey, user } from '#db/schema/auth.ts';
import { auth } from '#server/auth/auth.ts';

/** Who makes a request, and by what. */
export interface SignedIn {
  userId: string;
  name: string;
  email: string;
  administrator: boolean;
  /** Null where a personal key was sent instead of a session's cookie. */
  sessionToken: string | null;
}

export const sha256Hex = (text: string): string => createHash('sha256').update(text).digest('hex');

const actorColumns = {
  userId: user.id,
  name: user.name,
  email: user.email,
  administrator: user.administrator,
};

async function byKey(db: Db, key: string): Promise<SignedIn | null> {
  const valid = and(eq(personalKey.sha256, sha256Hex(key)), isNull(personalKey.revokedAt));
  const [row] = await db
    .select({ ...actorColumns, keyId: personalKey.id })
    .from(personalKey)
    .innerJoin(user, eq(user.id, personalKey.userId))
    .where(and(valid, isNull(user.deactivatedAt)));
  if (!row) return null;
  const { keyId, ...actor } = row;
  await db
    .update(personalKey)
    .set({ lastUsedAt: sql`now()` })
    .where(eq(personalKey.id, keyId));
  return { ...actor, sessionToken: null };
}

async function bySession(headers: Headers): Promise<SignedIn | null> {
  const found = await auth().api.getSession({ headers });
  if (!found || found.user.deactivatedAt) return null;
  const { id, name, email, administrator } = found.user;
  return { userId: id, name, email, administrator, sessionToken: found.session.token };
}

/** A personal key of `Authorization: Bearer`, or the session's cookie; a wrong key is nobody, cookie or not. */
export function whoAsks(db: Db, headers: Headers): Promise<SignedIn | null> {
  const bearer = /^Bearer\s+(\S+)$/i.exec(headers.get('authorization') ?? '');
  return bearer?.[1] ? byKey(db, bearer[1]) : bySession(headers);
}

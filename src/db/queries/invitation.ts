import { and, count, desc, eq, isNotNull, isNull, sql } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { invitation, user } from '../schema/auth.ts';

/** Neither accepted nor withdrawn; it may have expired. */
const isOpen = and(isNull(invitation.acceptedAt), isNull(invitation.revokedAt));

/** Open invitations, latest first. The first administrator's link has no address and is not among them. */
export async function listInvitations(db: Db, { page, pageSize }: { page: number; pageSize: number }) {
  const found = and(isOpen, isNotNull(invitation.email));
  const rows = await db
    .select({
      id: invitation.id,
      email: sql<string>`${invitation.email}`,
      administrator: invitation.administrator,
      invitedBy: user.name,
      createdAt: invitation.createdAt,
      expiresAt: invitation.expiresAt,
    })
    .from(invitation)
    .leftJoin(user, eq(user.id, invitation.invitedBy))
    .where(found)
    .orderBy(desc(invitation.createdAt), desc(invitation.id))
    .limit(pageSize)
    .offset((page - 1) * pageSize);
  const [counted] = await db.select({ n: count() }).from(invitation).where(found);
  return { rows, total: counted?.n ?? 0 };
}

const columns = {
  id: invitation.id,
  email: invitation.email,
  administrator: invitation.administrator,
  expiresAt: invitation.expiresAt,
  acceptedAt: invitation.acceptedAt,
  revokedAt: invitation.revokedAt,
};
export type InvitationRow = NonNullable<Awaited<ReturnType<typeof findInvitation>>>;

export async function findInvitation(db: Db, { sha256 }: { sha256: string }) {
  const [row] = await db.select(columns).from(invitation).where(eq(invitation.sha256, sha256));
  return row;
}

/** The same, locked until the transaction ends, so that a link works once. */
export async function lockInvitation(db: Db, { sha256 }: { sha256: string }) {
  const [row] = await db.select(columns).from(invitation).where(eq(invitation.sha256, sha256)).for('update');
  return row;
}

export async function insertInvitation(db: Db, values: typeof invitation.$inferInsert): Promise<string> {
  const [row] = await db.insert(invitation).values(values).returning({ id: invitation.id });
  if (!row) throw new Error('an insert returned no row');
  return row.id;
}

export async function markAccepted(db: Db, { id }: { id: string }): Promise<void> {
  await db
    .update(invitation)
    .set({ acceptedAt: sql`now()` })
    .where(eq(invitation.id, id));
}

/** Withdraws an address's open invitations: the newest link is the only one that works. */
export async function revokeInvitationsOf(db: Db, { email }: { email: string }): Promise<void> {
  await db
    .update(invitation)
    .set({ revokedAt: sql`now()` })
    .where(and(eq(invitation.email, email), isOpen));
}

/** @returns the address, or undefined where there is no such open invitation */
export async function revokeInvitation(db: Db, { id }: { id: string }): Promise<string | undefined> {
  const [row] = await db
    .update(invitation)
    .set({ revokedAt: sql`now()` })
    .where(and(eq(invitation.id, id), isOpen, isNotNull(invitation.email)))
    .returning({ email: invitation.email });
  return row?.email ?? undefined;
}

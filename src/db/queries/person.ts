import { and, asc, count, eq, gt, ilike, isNotNull, isNull, ne, notExists, or, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/pg-core';
import type { Db } from '../client.ts';
import { account, session, user } from '../schema/auth.ts';
import { member, study } from '../schema/study.ts';
import { containing } from './study.ts';

const columns = {
  id: user.id,
  name: user.name,
  email: user.email,
  administrator: user.administrator,
  deactivatedAt: user.deactivatedAt,
  createdAt: user.createdAt,
  updatedAt: user.updatedAt,
};
export type PersonRow = NonNullable<Awaited<ReturnType<typeof findPerson>>>;

export async function findPerson(db: Db, { userId }: { userId: string }) {
  const [row] = await db.select(columns).from(user).where(eq(user.id, userId));
  return row;
}

/** The same, locked until the transaction ends. */
export async function lockPerson(db: Db, { userId }: { userId: string }) {
  const [row] = await db.select(columns).from(user).where(eq(user.id, userId)).for('update');
  return row;
}

export async function findPersonByEmail(db: Db, { email }: { email: string }) {
  const [row] = await db.select(columns).from(user).where(eq(user.email, email));
  return row;
}

/** A page of everyone with an account: the active first, then by name. */
export async function listPeople(
  db: Db,
  { query, page, pageSize }: { query: string; page: number; pageSize: number },
) {
  const pattern = containing(query);
  const found = query ? or(ilike(user.name, pattern), ilike(user.email, pattern)) : undefined;
  const lastSeen = db
    .select({
      userId: session.userId,
      at: sql<Date>`max(${session.updatedAt})`.mapWith(session.updatedAt).as('at'),
    })
    .from(session)
    .groupBy(session.userId)
    .as('last_seen');
  const rows = await db
    .select({ ...columns, lastSeenAt: lastSeen.at })
    .from(user)
    .leftJoin(lastSeen, eq(lastSeen.userId, user.id))
    .where(found)
    .orderBy(sql`${user.deactivatedAt} is not null`, asc(sql`lower(${user.name})`), asc(user.id))
    .limit(pageSize)
    .offset((page - 1) * pageSize);
  const [counted] = await db.select({ n: count() }).from(user).where(found);
  return { rows, total: counted?.n ?? 0 };
}

export async function countOtherAdministrators(db: Db, { userId }: { userId: string }): Promise<number> {
  const others = and(eq(user.administrator, true), isNull(user.deactivatedAt), ne(user.id, userId));
  const [row] = await db.select({ n: count() }).from(user).where(others);
  return row?.n ?? 0;
}

type PersonValues = Partial<Pick<typeof user.$inferInsert, 'name' | 'administrator' | 'deactivatedAt'>>;

export async function updatePerson(db: Db, { userId, values }: { userId: string; values: PersonValues }) {
  const [row] = await db
    .update(user)
    // Versions of a person are milliseconds: two changes within one must still differ.
    .set({ ...values, updatedAt: sql`greatest(now(), ${user.updatedAt} + interval '1 millisecond')` })
    .where(eq(user.id, userId))
    .returning(columns);
  return row;
}

/** An account with a password; the address counts as checked, because its holder got a link there. */
export async function insertPerson(
  db: Db,
  values: { id: string; email: string; name: string; administrator: boolean; passwordHash: string },
): Promise<void> {
  const { passwordHash, ...person } = values;
  await db.insert(user).values({ ...person, emailVerified: true });
  await db.insert(account).values({
    id: values.id,
    accountId: values.id,
    providerId: 'credential',
    userId: values.id,
    password: passwordHash,
  });
}

export async function deleteSessions(db: Db, { userId }: { userId: string }): Promise<void> {
  await db.delete(session).where(eq(session.userId, userId));
}

/** Sessions that still hold, the latest in use first. Tokens stay in the database. */
export async function listSessions(db: Db, { userId }: { userId: string }) {
  return db
    .select({
      token: session.token,
      createdAt: session.createdAt,
      updatedAt: session.updatedAt,
      userAgent: session.userAgent,
      ipAddress: session.ipAddress,
    })
    .from(session)
    .where(and(eq(session.userId, userId), gt(session.expiresAt, sql`now()`)))
    .orderBy(sql`${session.updatedAt} desc`);
}

/** Studies without a lead who can sign in, oldest first. */
export async function listLeaderless(db: Db, { page, pageSize }: { page: number; pageSize: number }) {
  const lead = alias(member, 'lead');
  const leads = db
    .select({ one: sql`1` })
    .from(lead)
    .innerJoin(user, and(eq(user.id, lead.userId), isNull(user.deactivatedAt)))
    .where(and(eq(lead.studyId, study.id), eq(lead.role, 'lead')));
  const rows = await db
    .select({ studyId: study.id, createdAt: study.createdAt })
    .from(study)
    .where(notExists(leads))
    .orderBy(asc(study.createdAt), asc(study.id))
    .limit(pageSize)
    .offset((page - 1) * pageSize);
  const [counted] = await db.select({ n: count() }).from(study).where(notExists(leads));
  return { rows, total: counted?.n ?? 0 };
}

export async function listStudyPeople(db: Db, { studyId }: { studyId: string }) {
  return db
    .select({
      memberId: member.id,
      userId: user.id,
      name: user.name,
      email: user.email,
      role: member.role,
      deactivatedAt: user.deactivatedAt,
    })
    .from(member)
    .innerJoin(user, eq(user.id, member.userId))
    .where(and(eq(member.studyId, studyId), isNotNull(member.userId)))
    .orderBy(asc(member.role), asc(user.name));
}

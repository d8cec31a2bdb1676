import { and, asc, count, eq, ilike, isNull, ne, notExists, or, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/pg-core';
import type { Db } from '../client.ts';
import { user } from '../schema/auth.ts';
import { member, study } from '../schema/study.ts';
import { containing } from './study.ts';

export type MemberRole = 'lead' | 'engineer' | 'reviewer' | 'reader';

const columns = {
  id: member.id,
  email: member.email,
  userId: member.userId,
  role: member.role,
  version: member.version,
  createdAt: member.createdAt,
  name: user.name,
  deactivatedAt: user.deactivatedAt,
};
export type MemberRow = Awaited<ReturnType<typeof listMembers>>['rows'][number];

/** The people again, for a query that already reads them as who asked. */
const account = alias(user, 'account_holder');

interface InStudy {
  studyId: string;
}

/** A study's members and pending ones: leads first, then by name or address. */
export async function listMembers(
  db: Db,
  { studyId, query, page, pageSize }: InStudy & { query: string; page: number; pageSize: number },
) {
  const pattern = containing(query);
  const found = and(
    eq(member.studyId, studyId),
    query ? or(ilike(member.email, pattern), ilike(user.name, pattern)) : undefined,
  );
  const rows = await db
    .select(columns)
    .from(member)
    .leftJoin(user, eq(user.id, member.userId))
    .where(found)
    .orderBy(asc(member.role), asc(sql`lower(coalesce(${user.name}, ${member.email}))`), asc(member.id))
    .limit(pageSize)
    .offset((page - 1) * pageSize);
  const [counted] = await db
    .select({ n: count() })
    .from(member)
    .leftJoin(user, eq(user.id, member.userId))
    .where(found);
  return { rows, total: counted?.n ?? 0 };
}

export async function findMember(db: Db, { studyId, memberId }: InStudy & { memberId: string }) {
  const [row] = await db
    .select(columns)
    .from(member)
    .leftJoin(user, eq(user.id, member.userId))
    .where(and(eq(member.studyId, studyId), eq(member.id, memberId)));
  return row;
}

export async function findMemberByEmail(db: Db, { studyId, email }: InStudy & { email: string }) {
  const [row] = await db
    .select({ id: member.id })
    .from(member)
    .where(and(eq(member.studyId, studyId), eq(member.email, email)));
  return row;
}

/** How many leads with a working account a study has besides one member. */
export async function countOtherLeads(db: Db, { studyId, memberId }: InStudy & { memberId: string }) {
  const [row] = await db
    .select({ n: count() })
    .from(member)
    .innerJoin(user, and(eq(user.id, member.userId), isNull(user.deactivatedAt)))
    .where(and(eq(member.studyId, studyId), eq(member.role, 'lead'), ne(member.id, memberId)));
  return row?.n ?? 0;
}

export async function insertMember(
  db: Db,
  values: InStudy & { email: string; userId: string | null; role: MemberRole; addedBy: string | null },
): Promise<string> {
  const [row] = await db.insert(member).values(values).returning({ id: member.id });
  if (!row) throw new Error('an insert returned no row');
  return row.id;
}

export async function updateMemberRole(
  db: Db,
  { studyId, memberId, role }: InStudy & { memberId: string; role: MemberRole },
): Promise<void> {
  await db
    .update(member)
    .set({ role, version: sql`${member.version} + 1` })
    .where(and(eq(member.studyId, studyId), eq(member.id, memberId)));
}

export async function deleteMember(db: Db, { studyId, memberId }: InStudy & { memberId: string }) {
  await db.delete(member).where(and(eq(member.studyId, studyId), eq(member.id, memberId)));
}

/** The account behind an address, deactivated ones included. */
export async function findAccountByEmail(db: Db, { email }: { email: string }) {
  const [row] = await db.select({ id: user.id }).from(user).where(eq(user.email, email));
  return row;
}

/** Gives an address's pending memberships to its new account, and tells where. */
export async function bindMembers(db: Db, { userId, email }: { userId: string; email: string }) {
  const rows = await db
    .update(member)
    .set({ userId, version: sql`${member.version} + 1` })
    .where(and(eq(member.email, email), isNull(member.userId)))
    .returning({ memberId: member.id, studyId: member.studyId, role: member.role });
  return rows;
}

/** The revision of a study, for a line of its record. */
export async function findRevision(db: Db, { studyId }: InStudy): Promise<number | undefined> {
  const [row] = await db.select({ revision: study.revision }).from(study).where(eq(study.id, studyId));
  return row?.revision;
}

/**
 * Addresses that wait for an account: a lead made them members and no account has them yet, with who asked first.
 * Which studies they are for stays unsaid, because an administrator does not see studies.
 */
export async function listPendingAddresses(db: Db) {
  const hasAccount = db
    .select({ one: sql`1` })
    .from(account)
    .where(eq(account.email, member.email));
  return db
    .select({
      email: member.email,
      since: sql`min(${member.createdAt})`.mapWith(member.createdAt),
      studies: count(),
      askedBy: sql<string | null>`(array_agg(${user.name} order by ${member.createdAt}))[1]`,
    })
    .from(member)
    .leftJoin(user, eq(user.id, member.addedBy))
    .where(and(isNull(member.userId), notExists(hasAccount)))
    .groupBy(member.email)
    .orderBy(sql`min(${member.createdAt})`);
}

import { count, desc, eq, sql } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { mailMessage, outboxMessage } from '../schema/mail.ts';

interface Page {
  page: number;
  pageSize: number;
}

export async function insertMail(
  db: Db,
  values: { toAddress: string; subject: string; text: string },
): Promise<string> {
  const [row] = await db.insert(mailMessage).values(values).returning({ id: mailMessage.id });
  if (!row) throw new Error('an insert returned no row');
  return row.id;
}

export async function findMail(db: Db, { id }: { id: string }) {
  const [row] = await db
    .select({
      id: mailMessage.id,
      toAddress: mailMessage.toAddress,
      subject: mailMessage.subject,
      text: mailMessage.text,
      state: mailMessage.state,
    })
    .from(mailMessage)
    .where(eq(mailMessage.id, id));
  return row;
}

/** The text goes once it is sent: it may carry a one-time link, of which only a hash is to be kept. */
export async function markSent(db: Db, { id }: { id: string }): Promise<void> {
  await db
    .update(mailMessage)
    .set({
      state: 'sent',
      text: '',
      error: null,
      sentAt: sql`now()`,
      attempts: sql`${mailMessage.attempts} + 1`,
    })
    .where(eq(mailMessage.id, id));
}

export async function markFailed(db: Db, { id, error }: { id: string; error: string }): Promise<void> {
  await db
    .update(mailMessage)
    .set({ state: 'failed', error, attempts: sql`${mailMessage.attempts} + 1` })
    .where(eq(mailMessage.id, id));
}

/** What was sent or is still tried, latest first; texts left out. */
export async function listMail(db: Db, { page, pageSize }: Page) {
  const rows = await db
    .select({
      id: mailMessage.id,
      toAddress: mailMessage.toAddress,
      subject: mailMessage.subject,
      state: mailMessage.state,
      attempts: mailMessage.attempts,
      error: mailMessage.error,
      createdAt: mailMessage.createdAt,
      sentAt: mailMessage.sentAt,
    })
    .from(mailMessage)
    .orderBy(desc(mailMessage.createdAt), desc(mailMessage.id))
    .limit(pageSize)
    .offset((page - 1) * pageSize);
  const [counted] = await db.select({ n: count() }).from(mailMessage);
  return { rows, total: counted?.n ?? 0 };
}

export async function insertKept(db: Db, values: typeof outboxMessage.$inferInsert): Promise<void> {
  await db.insert(outboxMessage).values(values);
}

/** What the local SMTP fake kept, latest first. */
export async function listKept(db: Db, { page, pageSize }: Page) {
  const rows = await db
    .select({
      id: outboxMessage.id,
      fromAddress: outboxMessage.fromAddress,
      toAddresses: outboxMessage.toAddresses,
      subject: outboxMessage.subject,
      text: outboxMessage.text,
      receivedAt: outboxMessage.receivedAt,
    })
    .from(outboxMessage)
    .orderBy(desc(outboxMessage.receivedAt), desc(outboxMessage.id))
    .limit(pageSize)
    .offset((page - 1) * pageSize);
  const [counted] = await db.select({ n: count() }).from(outboxMessage);
  return { rows, total: counted?.n ?? 0 };
}

import type { Outbox } from '#contract/admin.ts';
import type { ListQuery } from '#contract/list.ts';
import type { Db } from '#db/client.ts';
import { listKept, listMail } from '#db/queries/mail.ts';
import { env } from '#server/env.ts';

/** What stayed here for want of a mail server, and the log of all mail. */
export async function readOutbox(db: Db, query: Pick<ListQuery, 'page' | 'pageSize'>): Promise<Outbox> {
  const [kept, sent] = [await listKept(db, query), await listMail(db, query)];
  return {
    mailServer: env().SMTP_URL !== undefined,
    kept: {
      items: kept.rows.map(({ id, fromAddress, toAddresses, subject, text, receivedAt }) => ({
        id,
        from: fromAddress,
        to: toAddresses,
        subject,
        text,
        receivedAt: receivedAt.toISOString(),
      })),
      total: kept.total,
    },
    sent: {
      items: sent.rows.map(({ toAddress, createdAt, sentAt, ...row }) => ({
        ...row,
        to: toAddress,
        createdAt: createdAt.toISOString(),
        sentAt: sentAt?.toISOString() ?? null,
      })),
      total: sent.total,
    },
  };
}

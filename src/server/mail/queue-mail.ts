import type { Db } from '#db/client.ts';
import { insertMail } from '#db/queries/mail.ts';
import { sendJob } from '#server/jobs/boss.ts';
import type { Letter } from './letters.ts';

/** Hands a letter to the mail queue within the caller's transaction: it goes out if and only if that commits. */
export async function queueMail(tx: Db, { to, subject, text }: Letter): Promise<void> {
  const messageId = await insertMail(tx, { toAddress: to, subject, text });
  await sendJob(tx, 'mail', { messageId });
}

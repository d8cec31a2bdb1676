import { createTransport, type Transporter } from 'nodemailer';
import { findMail, markFailed, markSent } from '#db/queries/mail.ts';
import { database } from '#server/database.ts';
import { env } from '#server/env.ts';
import { onStop } from '#server/lifecycle.ts';
import { startLocalMailServer } from './local-server.ts';

async function makeTransport(): Promise<Transporter> {
  const { SMTP_URL } = env();
  if (SMTP_URL) return createTransport(SMTP_URL);
  const local = await startLocalMailServer(database());
  onStop(local.close);
  return createTransport({ host: '127.0.0.1', port: local.port, secure: false, ignoreTLS: true });
}

let made: Promise<Transporter> | undefined;

function transport(): Promise<Transporter> {
  made ??= makeTransport().catch((error: unknown) => {
    made = undefined;
    throw error;
  });
  return made;
}

/**
 * The mail queue's handler. A failure is noted beside the message and thrown on, so that the queue tries again; a
 * message that was sent already is not sent twice.
 */
export async function deliverMail({ messageId }: { messageId: string }): Promise<void> {
  const db = database();
  const mail = await findMail(db, { id: messageId });
  if (!mail || mail.state === 'sent') return;
  const { toAddress: to, subject, text } = mail;
  try {
    await (await transport()).sendMail({ from: env().MAIL_FROM, to, subject, text });
  } catch (error) {
    await markFailed(db, { id: messageId, error: error instanceof Error ? error.message : String(error) });
    throw error;
  }
  await markSent(db, { id: messageId });
}

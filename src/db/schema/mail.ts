import { index, integer, pgEnum, pgTable, text } from 'drizzle-orm/pg-core';
import { idColumn, instant } from '../columns.ts';

export const mailState = pgEnum('mail_state', ['queued', 'sent', 'failed']);

/** A message the app sends. */
export const mailMessage = pgTable(
  'mail_message',
  {
    id: idColumn(),
    toAddress: text('to_address').notNull(),
    subject: text('subject').notNull(),
    text: text('text').notNull(),
    state: mailState('state').notNull().default('queued'),
    attempts: integer('attempts').notNull().default(0),
    error: text('error'),
    createdAt: instant('created_at').notNull().defaultNow(),
    sentAt: instant('sent_at'),
  },
  (t) => [index('mail_message_created_at_idx').on(t.createdAt)],
);

/** A message the local SMTP fake received, where no SMTP server is configured: the administrator's outbox. */
export const outboxMessage = pgTable(
  'outbox_message',
  {
    id: idColumn(),
    fromAddress: text('from_address').notNull(),
    toAddresses: text('to_addresses').array().notNull(),
    subject: text('subject').notNull(),
    text: text('text').notNull(),
    source: text('source').notNull(),
    receivedAt: instant('received_at').notNull().defaultNow(),
  },
  (t) => [index('outbox_message_received_at_idx').on(t.receivedAt)],
);

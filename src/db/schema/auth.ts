import { bigint, boolean, index, integer, pgTable, text, uniqueIndex } from 'drizzle-orm/pg-core';
import { idColumn, instant } from '../columns.ts';

/* Property names of the first five tables are better-auth's field names; it finds them by name. */

export const user = pgTable('user', {
  id: text('id').primaryKey(),
  name: text('name').notNull(),
  email: text('email').notNull().unique(),
  emailVerified: boolean('email_verified').notNull().default(false),
  image: text('image'),
  createdAt: instant('created_at').notNull().defaultNow(),
  updatedAt: instant('updated_at').notNull().defaultNow(),
  administrator: boolean('administrator').notNull().default(false),
  /** People are deactivated, never deleted: the record keeps their names. */
  deactivatedAt: instant('deactivated_at'),
});

export const session = pgTable(
  'session',
  {
    id: text('id').primaryKey(),
    expiresAt: instant('expires_at').notNull(),
    token: text('token').notNull().unique(),
    createdAt: instant('created_at').notNull().defaultNow(),
    updatedAt: instant('updated_at').notNull().defaultNow(),
    ipAddress: text('ip_address'),
    userAgent: text('user_agent'),
    userId: text('user_id')
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
  },
  (t) => [index('session_user_id_idx').on(t.userId)],
);

export const account = pgTable(
  'account',
  {
    id: text('id').primaryKey(),
    accountId: text('account_id').notNull(),
    providerId: text('provider_id').notNull(),
    userId: text('user_id')
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    accessToken: text('access_token'),
    refreshToken: text('refresh_token'),
    idToken: text('id_token'),
    accessTokenExpiresAt: instant('access_token_expires_at'),
    refreshTokenExpiresAt: instant('refresh_token_expires_at'),
    scope: text('scope'),
    password: text('password'),
    createdAt: instant('created_at').notNull().defaultNow(),
    updatedAt: instant('updated_at').notNull().defaultNow(),
  },
  (t) => [index('account_user_id_idx').on(t.userId)],
);

export const verification = pgTable(
  'verification',
  {
    id: text('id').primaryKey(),
    identifier: text('identifier').notNull(),
    value: text('value').notNull(),
    expiresAt: instant('expires_at').notNull(),
    createdAt: instant('created_at').notNull().defaultNow(),
    updatedAt: instant('updated_at').notNull().defaultNow(),
  },
  (t) => [index('verification_identifier_idx').on(t.identifier)],
);

export const rateLimit = pgTable('rate_limit', {
  id: text('id').primaryKey(),
  key: text('key').notNull().unique(),
  count: integer('count').notNull(),
  lastRequest: bigint('last_request', { mode: 'number' }).notNull(),
});

/** Failed sign-ins of an account, counted so that guessing slows down whatever address it comes from. */
export const signInFailure = pgTable(
  'sign_in_failure',
  {
    id: idColumn(),
    email: text('email').notNull(),
    at: instant('at').notNull().defaultNow(),
  },
  (t) => [index('sign_in_failure_email_at_idx').on(t.email, t.at)],
);

/** A personal key for scripts. Only its SHA-256 is kept; the key itself is shown once. */
export const personalKey = pgTable(
  'personal_key',
  {
    id: idColumn(),
    userId: text('user_id')
      .notNull()
      .references(() => user.id),
    name: text('name').notNull(),
    /** The first characters, so that its owner can tell keys apart. */
    start: text('start').notNull(),
    sha256: text('sha256').notNull().unique(),
    createdAt: instant('created_at').notNull().defaultNow(),
    lastUsedAt: instant('last_used_at'),
    revokedAt: instant('revoked_at'),
  },
  (t) => [index('personal_key_user_id_idx').on(t.userId)],
);

/** An administrator's invitation: a one-time link, of which only the SHA-256 is kept. */
export const invitation = pgTable(
  'invitation',
  {
    id: idColumn(),
    /** Null only in the first administrator's link, where whoever holds it names the address. */
    email: text('email'),
    administrator: boolean('administrator').notNull().default(false),
    sha256: text('sha256').notNull(),
    invitedBy: text('invited_by').references(() => user.id),
    createdAt: instant('created_at').notNull().defaultNow(),
    expiresAt: instant('expires_at').notNull(),
    acceptedAt: instant('accepted_at'),
    revokedAt: instant('revoked_at'),
  },
  (t) => [uniqueIndex('invitation_sha256_idx').on(t.sha256), index('invitation_email_idx').on(t.email)],
);

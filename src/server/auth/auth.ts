import { betterAuth } from 'better-auth';
import { drizzleAdapter } from 'better-auth/adapters/drizzle';
import { APIError } from 'better-auth/api';
import { MAX_PASSWORD_LENGTH, MIN_PASSWORD_LENGTH } from '#contract/account.ts';
import { schema } from '#db/client.ts';
import { findPerson } from '#db/queries/person.ts';
import { database } from '#server/database.ts';
import { allowedOrigins, env, publicOrigin } from '#server/env.ts';
import { addressLetter, resetLetter, type Letter } from '#server/mail/letters.ts';
import { queueMail } from '#server/mail/queue-mail.ts';
import { bindPendingMemberships } from '#server/members/pending.ts';
import { logError } from '#server/log.ts';
import { windowedLimit } from './rate-limit.ts';

const SESSION_S = 60 * 60 * 24 * 7;
const LINK_S = 60 * 60;

async function refuseDeactivated({ userId }: { userId: string }): Promise<void> {
  const person = await findPerson(database(), { userId });
  if (person?.deactivatedAt)
    throw new APIError('FORBIDDEN', { code: 'ACCOUNT_DEACTIVATED', message: 'The account is deactivated.' });
}

async function post(letter: Letter): Promise<void> {
  await database().transaction((tx) => queueMail(tx, letter));
}

function make() {
  const settings = env();
  const origin = publicOrigin(settings);
  return betterAuth({
    appName: 'Spinward',
    secret: settings.BETTER_AUTH_SECRET,
    baseURL: origin,
    trustedOrigins: allowedOrigins(settings),
    database: drizzleAdapter(database(), { provider: 'pg', schema, transaction: true }),
    user: {
      additionalFields: {
        administrator: { type: 'boolean', required: true, defaultValue: false, input: false },
        deactivatedAt: { type: 'date', required: false, input: false },
      },
    },
    // Names are changed through this product's own interface, which keeps the record; what tells a session's token
    // to a script, and the library's own pages, are not for anyone.
    disabledPaths: ['/update-user', '/get-session', '/list-sessions', '/revoke-session', '/error', '/ok'],
    onAPIError: { errorURL: '/sign-in' },
    emailAndPassword: {
      enabled: true,
      minPasswordLength: MIN_PASSWORD_LENGTH,
      maxPasswordLength: MAX_PASSWORD_LENGTH,
      disableSignUp: !settings.SPINWARD_OPEN_SIGNUP,
      // Whoever registers with an address gets the studies that wait for it: it has to be theirs.
      requireEmailVerification: settings.SPINWARD_OPEN_SIGNUP,
      revokeSessionsOnPasswordReset: true,
      resetPasswordTokenExpiresIn: LINK_S,
      sendResetPassword: ({ user, token }) =>
        post(resetLetter({ to: user.email, link: `${origin}/reset?token=${token}` })),
    },
    emailVerification: {
      sendOnSignUp: settings.SPINWARD_OPEN_SIGNUP,
      sendOnSignIn: settings.SPINWARD_OPEN_SIGNUP,
      autoSignInAfterVerification: true,
      expiresIn: LINK_S,
      sendVerificationEmail: ({ user, url }) => post(addressLetter({ to: user.email, link: url })),
      afterEmailVerification: ({ id, email }) =>
        database().transaction((tx) => bindPendingMemberships(tx, { userId: id, email })),
    },
    verification: { storeIdentifier: 'hashed' },
    databaseHooks: { session: { create: { before: refuseDeactivated } } },
    session: { expiresIn: SESSION_S, updateAge: 60 * 60, cookieCache: { enabled: false } },
    rateLimit: {
      enabled: true,
      customStorage: windowedLimit(database),
      window: 60,
      max: 200,
      customRules: {
        '/sign-in/email': { window: 60, max: 20 },
        '/sign-up/email': { window: 60, max: 10 },
        '/change-password': { window: 60, max: 10 },
      },
    },
    advanced: { cookiePrefix: 'spinward', ipAddress: { ipAddressHeaders: ['x-client-ip'] } },
    telemetry: { enabled: false },
    // A wrong password is a person's everyday business and no matter for the log.
    logger: {
      level: 'error',
      log: (_level, message, ...rest) =>
        logError({
          auth: message,
          cause: rest.map((one) => (one instanceof Error ? one.message : '')).join(' '),
        }),
    },
  });
}

export type Auth = ReturnType<typeof make>;

let made: Auth | undefined;

/** The one better-auth instance; made at first use, when the environment has been checked. */
export function auth(): Auth {
  made ??= make();
  return made;
}

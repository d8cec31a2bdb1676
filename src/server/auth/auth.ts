import { betterAuth } from 'better-auth';
import { drizzleAdapter } from 'better-auth/adapters/drizzle';
import { schema } from '#db/client.ts';
import { database } from '#server/database.ts';
import { allowedOrigins, env, publicOrigin } from '#server/env.ts';

const SESSION_SECONDS = 60 * 60 * 24 * 7;

function make() {
  const settings = env();
  return betterAuth({
    appName: 'Spinward',
    secret: settings.BETTER_AUTH_SECRET,
    baseURL: publicOrigin(settings),
    trustedOrigins: allowedOrigins(settings),
    database: drizzleAdapter(database(), { provider: 'pg', schema, transaction: true }),
    user: {
      additionalFields: {
        administrator: { type: 'boolean', required: true, defaultValue: false, input: false },
        deactivatedAt: { type: 'date', required: false, input: false },
      },
    },
    emailAndPassword: {
      enabled: true,
      minPasswordLength: 10,
      maxPasswordLength: 128,
      disableSignUp: !settings.SPINWARD_OPEN_SIGNUP,
      revokeSessionsOnPasswordReset: true,
    },
    session: { expiresIn: SESSION_SECONDS, updateAge: 60 * 60, cookieCache: { enabled: false } },
    rateLimit: {
      enabled: true,
      storage: 'database',
      window: 60,
      max: 200,
      customRules: { '/sign-in/email': { window: 60, max: 20 } },
    },
    advanced: { cookiePrefix: 'spinward', ipAddress: { ipAddressHeaders: ['x-client-ip'] } },
    telemetry: { enabled: false },
  });
}

export type Auth = ReturnType<typeof make>;

let made: Auth | undefined;

/** The one better-auth instance; made at first use, when the environment has been checked. */
export function auth(): Auth {
  made ??= make();
  return made;
}

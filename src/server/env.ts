import { z } from 'zod';

/** A setting left empty counts as absent, so that `PORT= npm start` behaves like `npm start`. */
const absent = (value: unknown): unknown => (value === '' ? undefined : value);
const setting = <T extends z.ZodType>(schema: T) => z.preprocess(absent, schema);

const flag = z.enum(['0', '1'], { error: 'must be 0 or 1' }).transform((value) => value === '1');
const urlOf = (protocols: RegExp, means: string) =>
  z.url({ protocol: protocols, error: `must be an address that begins with ${means}` });
const databaseUrl = urlOf(/^postgres(ql)?$/, 'postgres://');
const secret = z.string().min(32, { error: 'must have at least 32 characters' });

const origin = urlOf(/^https?$/, 'http:// or https://')
  .refine((value) => /^https?:\/\/[^/?#@]+\/?$/.test(value), {
    error: 'must be scheme, host and port alone, such as https://spinward.example.org',
  })
  .transform((value) => new URL(value).origin);

const fields = {
  /** Port of the web server. */
  PORT: setting(
    z.coerce
      .number({ error: 'must be a whole number from 1 to 65535' })
      .int({ error: 'must be a whole number from 1 to 65535' })
      .min(1, { error: 'must be a whole number from 1 to 65535' })
      .max(65_535, { error: 'must be a whole number from 1 to 65535' })
      .default(4321),
  ),
  /** Address the web server listens on. */
  HOST: setting(
    z
      .string()
      .regex(/^[\w.:-]+$/, { error: 'must be a host name or an IP address' })
      .default('127.0.0.1'),
  ),
  /** The app's connection; absent: the private cluster's. */
  DATABASE_URL: setting(databaseUrl.optional()),
  /** The owner's connection, which migrates; absent: DATABASE_URL. */
  DATABASE_MIGRATE_URL: setting(databaseUrl.optional()),
  /** Folder of what Spinward keeps: cluster, secret, stamps. */
  SPINWARD_DATA: setting(z.string().default('.data')),
  /** Signs sessions and links. */
  BETTER_AUTH_SECRET: setting(secret.optional()),
  /** The public address, where it differs from HOST and PORT. */
  SPINWARD_ORIGIN: setting(origin.optional()),
  /** 1: the demo is wanted, 0: it isn't, absent: as the start command decides. */
  SPINWARD_DEMO: setting(flag.optional()),
  /** 1: anyone may register. */
  SPINWARD_OPEN_SIGNUP: setting(flag.default(false)),
  /** 1: a proxy in front sets X-Forwarded-*, so they are believed. */
  SPINWARD_TRUST_PROXY: setting(flag.default(false)),
  /** The mail server; absent: mail stays in the administrator's outbox. */
  SMTP_URL: setting(urlOf(/^smtps?$/, 'smtp:// or smtps://').optional()),
  /** Sender of every mail. */
  MAIL_FROM: setting(
    z
      .string()
      .includes('@', { error: 'must hold a mail address' })
      .default('Spinward <no-reply@spinward.invalid>'),
  ),
};

/** What a person may set before `npm start`. */
const StartEnv = z.object(fields).refine((env) => !env.DATABASE_URL || env.BETTER_AUTH_SECRET, {
  path: ['BETTER_AUTH_SECRET'],
  error: 'must be set where DATABASE_URL is: sessions have to outlive this machine',
});

/** What the running app has: the start command has filled in the database and the secret by then. */
const AppEnv = z.object({
  ...fields,
  DATABASE_URL: setting(databaseUrl),
  BETTER_AUTH_SECRET: setting(secret),
});

export type StartEnv = z.infer<typeof StartEnv>;
export type AppEnv = z.infer<typeof AppEnv>;
type Source = Readonly<Record<string, string | undefined>>;

const CONFIDENTIAL = new Set(['DATABASE_URL', 'DATABASE_MIGRATE_URL', 'BETTER_AUTH_SECRET', 'SMTP_URL']);

/** A setting has a wrong value; the message names each on a line of its own and never shows a secret. */
export class EnvError extends Error {
  override readonly name = 'EnvError';
}

function describe(error: z.ZodError, source: Source): string {
  return error.issues
    .map((issue) => {
      const name = String(issue.path[0]);
      const value = source[name];
      if (value === undefined || value === '')
        return `${name} ${issue.message.startsWith('must be set') ? issue.message : 'must be set'}`;
      return `${name} ${issue.message}${CONFIDENTIAL.has(name) ? '' : ` (it is "${value}")`}`;
    })
    .join('\n');
}

function parse<T>(schema: z.ZodType<T>, source: Source): T {
  const result = schema.safeParse(source);
  if (!result.success) throw new EnvError(describe(result.error, source));
  return result.data;
}

/** The app's connection alone: all that a worker process is told. @throws EnvError */
export const readDatabaseUrl = (source: Source = process.env): string =>
  parse(z.object({ DATABASE_URL: setting(databaseUrl) }), source).DATABASE_URL;

/** Checks what the start command was given. @throws EnvError */
export const readStartEnv = (source: Source = process.env): StartEnv => parse(StartEnv, source);

let known: AppEnv | undefined;

/** The running app's settings, checked at the first call. @throws EnvError */
export function env(): AppEnv {
  known ??= parse(AppEnv, process.env);
  return known;
}

type Address = Pick<StartEnv, 'HOST' | 'PORT' | 'SPINWARD_ORIGIN'>;

const bracketed = (host: string): string => (host.includes(':') ? `[${host}]` : host);
const isWildcard = (host: string): boolean => host === '0.0.0.0' || host === '::';

/** The address people use, without a closing slash; links in mails begin with it. */
export function publicOrigin(at: Address): string {
  if (at.SPINWARD_ORIGIN) return at.SPINWARD_ORIGIN;
  return new URL(`http://${isWildcard(at.HOST) ? 'localhost' : bracketed(at.HOST)}:${at.PORT}`).origin;
}

/** Every origin a browser may truthfully send; requests from any other are another site's. */
export function allowedOrigins(at: Address): string[] {
  const local = ['localhost', '127.0.0.1', '[::1]'].map(
    (host) => new URL(`http://${host}:${at.PORT}`).origin,
  );
  return [...new Set([publicOrigin(at), ...local, ...(isWildcard(at.HOST) ? [] : [own(at)])])];
}
const own = (at: Address): string => new URL(`http://${bracketed(at.HOST)}:${at.PORT}`).origin;

import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { drizzle } from 'drizzle-orm/node-postgres';
import { migrate } from 'drizzle-orm/node-postgres/migrator';
import pg from 'pg';
import PgBoss from 'pg-boss';
import { JOBS_SCHEMA, QUEUES } from '#server/jobs/queues.ts';
import { readStartEnv } from '#server/env.ts';

const MIGRATIONS = fileURLToPath(new URL('../migrations', import.meta.url));

/** One lock for everyone who migrates this database; any fixed number serves. */
const LOCK = 7_746_124;

export interface MigrateOptions {
  /** The owner's connection; in a database of one role, that role's. */
  ownerUrl: string;
  /** The role the app connects with; migrations grant it what it may do. */
  appRole: string;
}

/**
 * Brings a database to the newest schema, pg-boss's with it. Two servers that start at once take turns: the lock is
 * held by one connection, which also runs the migrations, so it ends with the process whatever happens.
 */
export async function migrateDatabase({ ownerUrl, appRole }: MigrateOptions): Promise<void> {
  const client = new pg.Client({ connectionString: ownerUrl });
  await client.connect();
  try {
    await client.query('select pg_advisory_lock($1)', [LOCK]);
    await client.query(`select set_config('spinward.app_role', $1, false)`, [appRole]);
    await migrate(drizzle(client), { migrationsFolder: MIGRATIONS });
    await makeQueues(ownerUrl);
    await grantQueues(client, appRole);
  } finally {
    await client.end();
  }
}

/** pg-boss makes its schema at start and a partition for each queue: both need the owner. */
async function makeQueues(ownerUrl: string): Promise<void> {
  const boss = new PgBoss({
    connectionString: ownerUrl,
    schema: JOBS_SCHEMA,
    max: 1,
    supervise: false,
    schedule: false,
  });
  boss.on('error', () => undefined);
  await boss.start();
  try {
    for (const queue of QUEUES) await boss.createQueue(queue);
  } finally {
    await boss.stop({ graceful: false, wait: true });
  }
}

async function grantQueues(client: pg.Client, appRole: string): Promise<void> {
  const role = pg.escapeIdentifier(appRole);
  await client.query(`grant usage on schema ${JOBS_SCHEMA} to ${role}`);
  await client.query(
    `grant select, insert, update, delete on all tables in schema ${JOBS_SCHEMA} to ${role}`,
  );
  await client.query(`grant usage on all sequences in schema ${JOBS_SCHEMA} to ${role}`);
}

/** The role a connection address signs in with. */
export const roleOf = (url: string): string => decodeURIComponent(new URL(url).username);

if (process.argv[1] && path.resolve(process.argv[1]) === fileURLToPath(import.meta.url)) {
  const { DATABASE_URL, DATABASE_MIGRATE_URL } = readStartEnv();
  if (!DATABASE_URL)
    throw new Error('DATABASE_URL must be set; npm start migrates the private database by itself.');
  await migrateDatabase({ ownerUrl: DATABASE_MIGRATE_URL ?? DATABASE_URL, appRole: roleOf(DATABASE_URL) });
  console.log('Migrated.');
}

import { sql, type SQL } from 'drizzle-orm';
import PgBoss from 'pg-boss';
import type { Db } from '#db/client.ts';
import { database } from '#server/database.ts';
import { onStop } from '#server/lifecycle.ts';
import { JOBS_SCHEMA, type Jobs, type Queue } from './queues.ts';

/** Tries again after 30 s, 1 min, 2 min … for about eight hours, then gives up. */
const RETRIES = { retryLimit: 10, retryDelay: 30, retryBackoff: true } as const;

/** Runs pg-boss's statement on a given connection or transaction. */
export const on = (db: Db): PgBoss.Db => ({
  executeSql: async (text, values) => ({ rows: (await db.execute(bind(text, values))).rows }),
});

/** A statement with $1, $2 … as drizzle's own, so that it can join a transaction of ours. */
function bind(text: string, values: readonly unknown[] = []): SQL {
  const parts = text.split(/\$(\d+)/);
  return sql.join(
    parts.map((part, i) => (i % 2 ? sql`${sql.param(values[Number(part) - 1])}` : sql.raw(part))),
  );
}

let started: Promise<PgBoss> | undefined;

/** The process's one pg-boss; it uses the app's pool, and its schema is made by the migrations. */
export function boss(): Promise<PgBoss> {
  started ??= start().catch((error: unknown) => {
    started = undefined;
    throw error;
  });
  return started;
}

async function start(): Promise<PgBoss> {
  const pool = database().$client;
  const db: PgBoss.Db = { executeSql: (text, values) => pool.query(text, values) };
  const made = new PgBoss({ db, schema: JOBS_SCHEMA, migrate: false, schedule: false });
  // An outage of the database is told by /api/health; the workers poll on and find it again.
  made.on('error', () => undefined);
  await made.start();
  onStop(() => made.stop({ graceful: true, wait: true, timeout: 5_000 }));
  return made;
}

/** Puts a job in its queue within the caller's transaction: it exists if and only if that commits. */
export async function sendJob<Q extends Queue>(db: Db, queue: Q, data: Jobs[Q]): Promise<void> {
  await (await boss()).send(queue, data, { ...RETRIES, db: on(db) });
}

/** Takes up a queue's work in this process, one job at a time. A handler that throws is tried again. */
export async function workJobs<Q extends Queue>(
  queue: Q,
  handle: (data: Jobs[Q]) => Promise<void>,
): Promise<void> {
  const running = await boss();
  await running.work<Jobs[Q]>(queue, { batchSize: 1, pollingIntervalSeconds: 1 }, async ([job]) => {
    if (job) await handle(job.data);
  });
}

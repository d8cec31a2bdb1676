import { sql, type SQL } from 'drizzle-orm';
import type { Db, PooledDb } from '#db/client.ts';
import { boss, on } from './boss.ts';
import { JOBS_SCHEMA, type Jobs, type Queue } from './queues.ts';

/*
 * Jobs that take long are leased: whoever works one renews the lease; when its process is killed the lease runs out
 * and the next worker takes the job up. pg-boss counts a lease from `started_on`, which renewing moves, and numbers
 * the turns of a job in `retry_count`, which tells the turn that holds it from those that lost it.
 */

/** A lease that is not renewed runs out after this, and is renewed three times in it. */
export const LEASE_SECONDS = 9;
export const RENEW_MS = 3_000;

/** Turns a job may have. Each flight in it has a limit of its own, far below; this one only ends what never ends. */
const MOST_TURNS = 1_000;

export interface Lease<Q extends Queue> {
  queue: Q;
  id: string;
  data: Jobs[Q];
  turn: number;
}

export interface NewJob<Q extends Queue> {
  id: string;
  data: Jobs[Q];
  /** Higher ones are taken first. */
  priority: number;
}

/** Puts jobs that are leased in their queue within the caller's transaction. */
export async function sendLeased<Q extends Queue>(
  db: Db,
  queue: Q,
  jobs: readonly NewJob<Q>[],
): Promise<void> {
  if (jobs.length === 0) return;
  const terms = { name: queue, expireInSeconds: LEASE_SECONDS, retryLimit: MOST_TURNS, retryDelay: 0 };
  const running = await boss();
  await running.insert(
    jobs.map((job) => ({ ...terms, ...job })),
    { db: on(db) },
  );
}

/** The next job of a queue; undefined where none waits, or the database is away. */
export async function takeLease<Q extends Queue>(queue: Q): Promise<Lease<Q> | undefined> {
  const running = await boss();
  const [job] = await running.fetch<Jobs[Q]>(queue, { batchSize: 1, includeMetadata: true });
  return job && { queue, id: job.id, data: job.data, turn: job.retryCount };
}

const job = sql.raw(`${JOBS_SCHEMA}.job`);
const ours = ({ queue, id, turn }: Lease<Queue>): SQL =>
  sql`name = ${queue} and id = ${id} and state = 'active' and retry_count = ${turn}`;

/** True, as a condition of a statement, for as long as the lease is held. */
export const isHeld = (lease: Lease<Queue>): SQL => sql`exists (select 1 from ${job} where ${ours(lease)})`;

/** Counts the lease from now on. @returns whether it is still held */
export async function renewLease(db: Db, lease: Lease<Queue>): Promise<boolean> {
  const { rowCount } = await db.execute(sql`update ${job} set started_on = now() where ${ours(lease)}`);
  return rowCount === 1;
}

/** Ends a job that is done, unless its lease was lost. */
export async function finishJob(db: PooledDb, lease: Lease<Queue>): Promise<void> {
  const running = await boss();
  await db.transaction(async (tx) => {
    if (await renewLease(tx, lease)) await running.complete(lease.queue, lease.id, {}, { db: on(tx) });
  });
}

/** Hands a job back for anyone's next turn, with the reason, unless its lease was lost. */
export async function giveBack(db: PooledDb, lease: Lease<Queue>, reason: string): Promise<void> {
  const running = await boss();
  await db.transaction(async (tx) => {
    if (await renewLease(tx, lease)) await running.fail(lease.queue, lease.id, { reason }, { db: on(tx) });
  });
}

/** Those of some jobs that wait or are worked. */
export async function liveJobs(db: Db, queue: Queue, ids: readonly string[]): Promise<Set<string>> {
  const { rows } = await db.execute<{ id: string }>(
    sql`select id from ${job} where name = ${queue} and state < 'completed'
      and id = any(${sql.param([...ids])}::uuid[])`,
  );
  return new Set(rows.map(({ id }) => id));
}

/** Takes jobs out of their queue; one that is worked just now loses its lease and stops at its next step. */
export async function cancelJobs(db: Db, queue: Queue, ids: readonly string[]): Promise<void> {
  if (ids.length > 0) await (await boss()).cancel(queue, [...ids], { db: on(db) });
}

/** Makes jobs whose lease ran out free for the next turn. Every worker calls it; whichever comes first does it. */
export async function freeLostJobs(): Promise<void> {
  await (await boss()).expire();
}

import { and, eq, inArray, ne, sql, type SQL } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { ascent, ascentVehicle, type AscentFailure } from '../schema/ascent.ts';

type Json = Record<string, unknown>;

/** A flight is tried this often: where it throws, and where the process that flew it was lost. */
export const MOST_ATTEMPTS = 5;

const underWay = inArray(ascent.state, ['waiting', 'flying']);

interface InBatch {
  hash: string;
  batchId: string;
}

const inBatch = ({ hash, batchId }: InBatch) =>
  and(eq(ascent.hash, hash), eq(ascent.batchId, batchId), underWay);

/**
 * Takes up a flight, if its batch still carries it and `held` is true at that very moment.
 * @returns what is to be flown; undefined where it is done, cancelled, carried by another batch or tried too often
 */
export async function takeUpAscent(db: Db, { held, ...which }: InBatch & { held: SQL }) {
  const [row] = await db
    .update(ascent)
    .set({ state: 'flying', attempts: sql`${ascent.attempts} + 1` })
    .from(ascentVehicle)
    .where(
      and(
        inBatch(which),
        eq(ascentVehicle.hash, ascent.vehicleHash),
        sql`${ascent.attempts} < ${MOST_ATTEMPTS}`,
        held,
      ),
    )
    .returning({ task: ascent.task, vehicle: ascentVehicle.vehicle });
  return row;
}

/** Gives up a flight whose every attempt came to nothing, the last ones without a word. */
export async function giveUpAscent(db: Db, { reason, ...which }: InBatch & { reason: string }) {
  await db
    .update(ascent)
    .set({ state: 'failed', finishedAt: sql`now()`, failures: oneMore(reason) })
    .where(and(inBatch(which), sql`${ascent.attempts} >= ${MOST_ATTEMPTS}`));
}

const oneMore = (reason: string): SQL => {
  const failure: AscentFailure[] = [{ at: new Date().toISOString(), reason }];
  return sql`${ascent.failures} || ${JSON.stringify(failure)}::jsonb`;
};

/** Keeps a result, whoever meanwhile cancelled it: the same inputs need not be flown again. */
export async function storeAscent(
  db: Db,
  result: { hash: string; outcome: Json; trajectory: Buffer; tookS: number },
): Promise<void> {
  const { hash, ...values } = result;
  await db
    .update(ascent)
    .set({ ...values, state: 'done', finishedAt: sql`now()` })
    .where(and(eq(ascent.hash, hash), ne(ascent.state, 'done')));
}

/**
 * Notes why an attempt failed; the flight waits for its next one, or has failed for good.
 * @returns whether it will be tried again
 */
export async function noteFailure(
  db: Db,
  { reason, ...which }: InBatch & { reason: string },
): Promise<boolean> {
  const [row] = await db
    .update(ascent)
    .set({
      state: sql`case when ${ascent.attempts} < ${MOST_ATTEMPTS} then 'waiting' else 'failed' end::ascent_state`,
      finishedAt: sql`now()`,
      failures: oneMore(reason),
    })
    .where(inBatch(which))
    .returning({ state: ascent.state });
  return row?.state === 'waiting';
}

/** The trajectory of a result, gzipped. */
export async function findTrajectory(db: Db, { hash }: { hash: string }) {
  const [row] = await db
    .select({ trajectory: ascent.trajectory })
    .from(ascent)
    .where(and(eq(ascent.hash, hash), eq(ascent.state, 'done')));
  return row?.trajectory ?? undefined;
}

export interface AscentRow {
  hash: string;
  vehicleHash: string;
  task: Json;
  method: number;
}

const ROWS_A_STATEMENT = 2_000;

/** Makes rows for flights that nobody has asked for yet; those that are there stay as they are. */
export async function insertAscents(
  db: Db,
  { vehicle, rows }: { vehicle: { hash: string; vehicle: Json }; rows: readonly AscentRow[] },
): Promise<void> {
  await db.insert(ascentVehicle).values(vehicle).onConflictDoNothing();
  // One order for everyone, so that two who ask for the same flights never wait for each other in a ring.
  const sorted = [...rows].sort((a, b) => (a.hash < b.hash ? -1 : 1));
  for (let i = 0; i < sorted.length; i += ROWS_A_STATEMENT) {
    const some = JSON.stringify(sorted.slice(i, i + ROWS_A_STATEMENT));
    await db.execute(sql`
      insert into ascent (hash, vehicle_hash, task, method)
      select hash, "vehicleHash", task, method
      from jsonb_to_recordset(${some}::jsonb) as new(hash text, "vehicleHash" text, task jsonb, method integer)
      on conflict (hash) do nothing`);
  }
}

/** A list of hashes as one parameter, however long. */
const oneOf = (hashes: readonly string[]): SQL =>
  sql`${ascent.hash} = any(${sql.param([...hashes])}::text[])`;

/** Rows of hashes, locked until the transaction ends, in the order everyone locks them. */
export function lockAscents(db: Db, { hashes }: { hashes: readonly string[] }) {
  return db
    .select({
      hash: ascent.hash,
      state: ascent.state,
      priority: ascent.priority,
      batchId: ascent.batchId,
    })
    .from(ascent)
    .where(oneOf(hashes))
    .orderBy(ascent.hash)
    .for('update');
}

/** Puts flights into the batch that will carry them, with their attempts before them. */
export async function assignAscents(
  db: Db,
  { priority, batches }: { priority: number; batches: readonly { id: string; hashes: readonly string[] }[] },
): Promise<void> {
  const rows = batches.flatMap(({ id, hashes }) => hashes.map((hash) => ({ id, hash })));
  if (rows.length === 0) return;
  await db.execute(sql`
    update ascent set state = 'waiting', batch_id = new.id, attempts = 0, asked_at = now(),
      priority = greatest(priority, ${priority}::integer)
    from jsonb_to_recordset(${JSON.stringify(rows)}::jsonb) as new(id uuid, hash text)
    where ascent.hash = new.hash`);
}

/**
 * Cancels those of some flights that nobody asks for any longer.
 * @returns the batches that carried them and carry nothing else
 */
export async function cancelUnasked(db: Db, { hashes }: { hashes: readonly string[] }): Promise<string[]> {
  if (hashes.length === 0) return [];
  await lockAscents(db, { hashes });
  const { rows } = await db.execute<{ batchId: string }>(sql`
    with cancelled as (
      update ascent set state = 'cancelled'
      where ${oneOf(hashes)} and state in ('waiting', 'flying') and not exists (
        select 1 from ascent_request r where r.hash = ascent.hash and r.cancelled_at is null)
      returning hash, batch_id)
    select distinct batch_id as "batchId" from cancelled where batch_id is not null and not exists (
      select 1 from ascent other where other.batch_id = cancelled.batch_id
        and other.state in ('waiting', 'flying') and other.hash not in (select hash from cancelled))`);
  return rows.map(({ batchId }) => batchId);
}

/** States and results, without trajectories, of those hashes that were ever asked for. */
export function findAscents(db: Db, { hashes }: { hashes: readonly string[] }) {
  return db
    .select({
      hash: ascent.hash,
      state: ascent.state,
      failures: ascent.failures,
      outcome: ascent.outcome,
      finishedAt: ascent.finishedAt,
    })
    .from(ascent)
    .where(oneOf(hashes));
}

/** Over how long the pace of flying is taken. */
const PACE_SECONDS = 30;

/**
 * How many flights are before and among a study's own that are under way, and how many a second were flown of late.
 * The pace is counted from when the oldest that counts was asked for, so that a queue that has just begun is not
 * taken for a slow one.
 */
export async function queueAhead(db: Db, { studyId }: { studyId: string }) {
  const { rows } = await db.execute<{ ahead: number; perSecond: number | null }>(sql`
    with mine as (
      select min(a.priority) as priority, max(a.asked_at) as asked_at
      from ascent a join ascent_request r on r.hash = a.hash
      where r.study_id = ${studyId} and r.cancelled_at is null and a.state in ('waiting', 'flying')),
    late as (
      select count(*) as flown, extract(epoch from now() - greatest(
        min(asked_at), now() - make_interval(secs => ${PACE_SECONDS}))) as seconds
      from ascent where state = 'done' and finished_at > now() - make_interval(secs => ${PACE_SECONDS}))
    select
      (select count(*) from ascent a, mine where a.state in ('waiting', 'flying') and (a.priority > mine.priority
        or (a.priority = mine.priority and a.asked_at <= mine.asked_at)))::integer as ahead,
      (select flown / nullif(seconds, 0) from late where flown > 0)::float8 as "perSecond"`);
  const [row] = rows;
  return row ?? { ahead: 0, perSecond: null };
}

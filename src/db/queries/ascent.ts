import { and, count, eq, gt, inArray, lt, ne, or, sql, type SQL } from 'drizzle-orm';
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

/**
 * A list of hashes as one parameter, however long. Nothing here joins flights with requests: of twenty thousand rows
 * made a moment ago the planner knows nothing, and joins them by comparing each with each.
 */
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
  const pairs = batches.flatMap(({ id, hashes }) => hashes.map((hash) => [hash, id] as const));
  if (pairs.length === 0) return;
  const batchOf = JSON.stringify(Object.fromEntries(pairs));
  await db.execute(sql`
    update ascent set state = 'waiting', batch_id = (${batchOf}::jsonb ->> hash)::uuid, attempts = 0,
      asked_at = now(), priority = greatest(priority, ${priority}::integer)
    where ${oneOf(pairs.map(([hash]) => hash))}`);
}

/**
 * Cancels flights that nobody asks for any longer; they have been locked.
 * @returns the batches that carried them and carry nothing else
 */
export async function cancelFlights(db: Db, { hashes }: { hashes: readonly string[] }): Promise<string[]> {
  const rows = await db
    .update(ascent)
    .set({ state: 'cancelled' })
    .where(and(oneOf(hashes), underWay))
    .returning({ batchId: ascent.batchId });
  const batchIds = [...new Set(rows.flatMap(({ batchId }) => batchId ?? []))];
  const busy = await db
    .selectDistinct({ batchId: ascent.batchId })
    .from(ascent)
    .where(and(sql`${ascent.batchId} = any(${sql.param(batchIds)}::uuid[])`, underWay));
  const stillNeeded = new Set(busy.map(({ batchId }) => batchId));
  return batchIds.filter((batchId) => !stillNeeded.has(batchId));
}

/** States of those hashes that were ever asked for. */
export function findAscents(db: Db, { hashes }: { hashes: readonly string[] }) {
  return db
    .select({
      hash: ascent.hash,
      state: ascent.state,
      priority: ascent.priority,
      askedAt: ascent.askedAt,
      finishedAt: ascent.finishedAt,
      reason: sql<string | null>`${ascent.failures} -> -1 ->> 'reason'`,
    })
    .from(ascent)
    .where(oneOf(hashes));
}

/** Results, without trajectories, of hashes. */
export function findOutcomes(db: Db, { hashes }: { hashes: readonly string[] }) {
  return db
    .select({ hash: ascent.hash, outcome: ascent.outcome })
    .from(ascent)
    .where(and(oneOf(hashes), eq(ascent.state, 'done')));
}

/** Over how long the pace of flying is taken. */
const PACE_SECONDS = 30;

/** How many flights of the whole queue come before the last of a priority that was asked for at a time, and it. */
export async function countAhead(db: Db, last: { priority: number; askedAt: Date }): Promise<number> {
  // A Date leaves out what the column holds below a millisecond.
  const after = new Date(last.askedAt.getTime() + 1);
  const [row] = await db
    .select({ n: count() })
    .from(ascent)
    .where(
      and(
        underWay,
        or(
          gt(ascent.priority, last.priority),
          and(eq(ascent.priority, last.priority), lt(ascent.askedAt, after)),
        ),
      ),
    );
  return row?.n ?? 0;
}

/**
 * How many flights a second were flown of late, by all workers; null where none were. It is counted from when the
 * first of them was asked for, so that a queue that has just begun is not taken for a slow one.
 */
export async function recentPace(db: Db): Promise<number | null> {
  const window = sql`now() - make_interval(secs => ${PACE_SECONDS})`;
  const [row] = await db
    .select({
      pace: sql<
        number | null
      >`(count(*) / nullif(extract(epoch from now() - greatest(min(${ascent.askedAt}), ${window})), 0))::float8`,
    })
    .from(ascent)
    .where(and(eq(ascent.state, 'done'), sql`${ascent.finishedAt} > ${window}`));
  return row?.pace || null;
}

import { promisify } from 'node:util';
import { gzip } from 'node:zlib';
import { AscentTask, type AscentOutcome } from '#contract/ascent-job.ts';
import type { PooledDb } from '#db/client.ts';
import { giveUpAscent, noteFailure, storeAscent, takeUpAscent } from '#db/queries/ascent.ts';
import { databaseAway } from '#server/endpoint.ts';
import { finishJob, giveBack, isHeld, RENEW_MS, renewLease, type Lease } from '#server/jobs/lease.ts';

export type FlyAscent = (task: AscentTask) => Promise<AscentOutcome>;

export interface FlyOptions {
  db: PooledDb;
  fly: FlyAscent;
  /** Told of every flight that moved on. */
  onProgress: (hash: string) => void;
  /** Aborted where the worker is to stop after the flight under way. */
  signal: AbortSignal;
}

const compress = promisify(gzip);

/** A result in hand is worth waiting for: an outage of the database is sat out this long, then it is flown again. */
const PATIENCE_MS = 60_000;
const AGAIN_MS = 500;

const pause = (ms: number): Promise<void> => new Promise((resolve) => setTimeout(resolve, ms));

async function whenDatabaseAnswers(write: () => Promise<void>): Promise<void> {
  const until = Date.now() + PATIENCE_MS;
  for (;;)
    try {
      return await write();
    } catch (error) {
      if (!databaseAway(error) || Date.now() > until) throw error;
      await pause(AGAIN_MS);
    }
}

const GIVEN_UP = 'Whatever flew it was lost without a word, or the database was, as often as it was tried.';

type Step = 'done' | 'again';

async function flyOne(options: FlyOptions, lease: Lease<'ascents'>, hash: string): Promise<Step> {
  const { db, fly, onProgress } = options;
  const which = { hash, batchId: lease.id };
  const row = await takeUpAscent(db, { ...which, held: isHeld(lease) });
  if (!row) {
    await giveUpAscent(db, { ...which, reason: GIVEN_UP });
    return 'done';
  }
  onProgress(hash);
  const started = performance.now();
  let flown: AscentOutcome;
  try {
    flown = await fly(AscentTask.parse({ ...row.task, vehicle: row.vehicle }));
  } catch (error) {
    const reason = error instanceof Error ? error.message : String(error);
    return (await noteFailure(db, { ...which, reason })) ? 'again' : 'done';
  }
  const tookS = (performance.now() - started) / 1_000;
  const { trajectory, ...outcome } = flown;
  const packed = await compress(JSON.stringify(trajectory));
  await whenDatabaseAnswers(() => storeAscent(db, { hash, outcome, trajectory: packed, tookS }));
  return 'done';
}

/** Renews the lease for as long as it is held. @returns whether it still is, and how to stop */
function holdLease(db: PooledDb, lease: Lease<'ascents'>): { isLost: () => boolean; letGo: () => void } {
  let lost = false;
  const renew = (): Promise<void> =>
    renewLease(db, lease).then(
      (held) => {
        lost ||= !held;
      },
      // While the database is away nobody else can take the lease either.
      () => undefined,
    );
  const timer = setInterval(() => void renew(), RENEW_MS);
  return { isLost: () => lost, letGo: () => clearInterval(timer) };
}

/**
 * Flies a batch one after the other. What is done, cancelled or carried by another batch is passed over, so that a
 * batch that was begun by a process that is gone goes on where it stopped.
 */
export async function flyBatch(options: FlyOptions, lease: Lease<'ascents'>): Promise<void> {
  const { db, onProgress, signal } = options;
  const { isLost, letGo } = holdLease(db, lease);
  let again = false;
  try {
    for (const hash of lease.data.hashes) {
      if (isLost()) return;
      if (signal.aborted) return await giveBack(db, lease, 'The worker was stopped.');
      const step = await flyOne(options, lease, hash);
      again ||= step === 'again';
      onProgress(hash);
    }
  } finally {
    letGo();
  }
  await (again ? giveBack(db, lease, 'Some flights failed and are tried again.') : finishJob(db, lease));
}

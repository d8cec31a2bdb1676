import { availableParallelism } from 'node:os';
import type { PooledDb } from '#db/client.ts';
import { databaseAway } from '#server/endpoint.ts';
import { freeLostJobs, takeLease } from '#server/jobs/lease.ts';
import { logError } from '#server/log.ts';
import { progressOf } from './announce.ts';
import { flyBatch, type FlyAscent, type FlyOptions } from './fly-batch.ts';

/** How soon an idle worker sees new work, and how soon work of a lost one is noticed. */
const POLL_MS = 500;
const LOST_MS = 2_000;

/** One core is left for requests. */
export const MOST_AT_ONCE = Math.max(1, availableParallelism() - 1);

function logFailure(error: unknown): void {
  if (!databaseAway(error)) logError({ worker: 'ascents', error: String(error) });
}

/** Takes up one batch after the other until it is told to stop. */
async function workOn(options: FlyOptions): Promise<void> {
  const { signal } = options;
  while (!signal.aborted) {
    const flown = await takeLease('ascents')
      .then(async (lease) => {
        if (lease) await flyBatch(options, lease);
        return lease !== undefined;
      })
      .catch((error: unknown) => {
        logFailure(error);
        return false;
      });
    if (!flown) await idle(signal);
  }
}

const idle = (signal: AbortSignal): Promise<void> =>
  new Promise((resolve) => {
    const done = (): void => {
      clearTimeout(timer);
      signal.removeEventListener('abort', done);
      resolve();
    };
    const timer = setTimeout(done, POLL_MS);
    signal.addEventListener('abort', done);
  });

export interface AscentWorker {
  /** Lets the flights under way end, hands back what is left of their batches, and ends. */
  stop: () => Promise<void>;
}

/**
 * Flies what studies ask for, on this process's share of the queue. Any number of processes on any number of
 * machines may do so at once.
 *
 * @param fly flies one ascent off the main thread
 * @param atOnce how many flights at a time
 */
export function workAscents({
  db,
  fly,
  atOnce = MOST_AT_ONCE,
}: {
  db: PooledDb;
  fly: FlyAscent;
  atOnce?: number;
}): AscentWorker {
  const stopping = new AbortController();
  const progress = progressOf(db);
  const onProgress = (hash: string): void => progress.add(hash);
  const options = { db, fly, onProgress, signal: stopping.signal };
  const lost = setInterval(() => void freeLostJobs().catch(logFailure), LOST_MS);
  const working = Array.from({ length: atOnce }, () => workOn(options));
  return {
    stop: async () => {
      stopping.abort();
      clearInterval(lost);
      await Promise.all(working);
      progress.flush();
    },
  };
}

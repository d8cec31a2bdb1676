import type { PooledDb } from '#db/client.ts';
import { countRequest, deleteRequestsBefore } from '#db/queries/sign-in.ts';

const PRUNE_EVERY_MS = 60 * 60 * 1000;

/**
 * Counts requests a key in windows that begin with the first request, in the database, so that several processes
 * count together. The library's own window moves with every request and would refuse the twenty-first sign-in of an
 * office in an afternoon, were they less than a minute apart.
 */
export function windowedLimit(db: () => PooledDb, now: () => number = Date.now) {
  let prunedMs = 0;
  return {
    async consume(key: string, rule: { window: number; max: number }) {
      const nowMs = now();
      const windowMs = rule.window * 1000;
      if (nowMs - prunedMs > PRUNE_EVERY_MS) {
        prunedMs = nowMs;
        await deleteRequestsBefore(db(), { beforeMs: nowMs - PRUNE_EVERY_MS });
      }
      const { count, startedMs } = await countRequest(db(), { key, nowMs, windowMs });
      const allowed = count <= rule.max;
      return { allowed, retryAfter: allowed ? null : Math.ceil((startedMs + windowMs - nowMs) / 1000) };
    },
  };
}

import path from 'node:path';
import { availableParallelism } from 'node:os';
import { Piscina } from 'piscina';
import { onStop } from './lifecycle.ts';

/** Thread entries, bundled from src/worker by scripts/build.ts. */
type ThreadName =
  | 'evaluate-thread'
  | 'decide-thread'
  | 'corridor-thread'
  | 'ascent-thread'
  | 'ascent-job-thread'
  | 'memo-thread'
  | 'sensitivity-thread';

const pools = new Map<ThreadName, Piscina>();

/** At least two, so that a long task of one person does not hold up the next; threads that idle are let go. */
const THREADS = Math.max(2, availableParallelism() - 1);

function poolOf(name: ThreadName): Piscina {
  const known = pools.get(name);
  if (known) return known;
  const filename = path.resolve('dist/worker', `${name}.mjs`);
  const pool = new Piscina({ filename, minThreads: 0, maxThreads: THREADS, idleTimeout: 60_000 });
  pools.set(name, pool);
  onStop(() => pool.destroy());
  return pool;
}

/** Runs one task of a thread entry off the main thread. */
export function runInThread<Answer>(name: ThreadName, task: unknown): Promise<Answer> {
  return poolOf(name).run(task) as Promise<Answer>;
}

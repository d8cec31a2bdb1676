import type { AscentOutcome } from '#contract/ascent-job.ts';
import { runInThread } from '#server/threads.ts';
import type { FlyAscent } from './fly-batch.ts';

const decoder = new TextDecoder();

/** Flies an ascent of the queue in a worker thread that steps back behind requests. */
export const flyInThread: FlyAscent = async (task) =>
  JSON.parse(decoder.decode(await runInThread<Uint8Array>('ascent-job-thread', task))) as AscentOutcome;

import os from 'node:os';
import { move } from 'piscina';
import type { AscentTask } from '#contract/ascent-job.ts';
import { ascentBytes } from '#contract/flown-ascent.ts';

/** Behind whatever a person waits for; the scale goes from −20 to 19. */
const LOW_PRIORITY = 10;

// Linux keeps a priority for each thread, so this one alone steps back.
if (process.platform === 'linux') os.setPriority(LOW_PRIORITY);

/** Entry of a worker thread: one ascent of a queue of them, as JSON text in bytes. */
export default function ascentJobThread(task: AscentTask): Uint8Array {
  return move(ascentBytes(task)) as Uint8Array;
}

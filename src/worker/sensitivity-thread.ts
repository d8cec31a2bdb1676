import { move } from 'piscina';
import { sensitivityBytes, type SensitivityTask } from '#contract/sensitivity-model.ts';

/** Entry of a worker thread: whether a ranking holds, as JSON text in bytes, handed over without a copy. */
export default function sensitivityThread(task: SensitivityTask): Uint8Array {
  return move(sensitivityBytes(task)) as Uint8Array;
}

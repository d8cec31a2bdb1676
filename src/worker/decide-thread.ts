import { move } from 'piscina';
import type { DecideInput } from '#contract/decide.ts';
import { decisionBytes } from '#contract/decision.ts';

/** Entry of a worker thread: a decision's input in, its answer as JSON text in bytes, handed over without a copy. */
export default function decideThread(input: DecideInput): Uint8Array {
  return move(decisionBytes(input)) as Uint8Array;
}

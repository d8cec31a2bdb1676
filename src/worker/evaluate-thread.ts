import { move } from 'piscina';
import type { EvaluateInput } from '#contract/evaluate.ts';
import { evaluationPart } from '#contract/flights.ts';

/** Entry of a worker thread: sites and orbits in, their results as JSON text in bytes, handed over without a copy. */
export default function evaluateThread(input: EvaluateInput): Uint8Array {
  return move(evaluationPart(input)) as Uint8Array;
}

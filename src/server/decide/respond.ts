import type { DecideInput } from '#contract/decide.ts';
import { decisionBytes } from '#contract/decision.ts';
import { runInThread } from '#server/threads.ts';

/** Figures looked at that the main thread answers by itself: some milliseconds. */
const MOST_AT_ONCE = 300_000;

/** How many figures a decision looks at: every pair of alternatives for dominance, every one of every draw. */
export function figuresOf({ criteria, alternatives, acceptability }: DecideInput): number {
  const draws = acceptability?.samples ?? 0;
  return alternatives.length * criteria.length * (alternatives.length + draws);
}

/** Works out a large decision off the main thread and answers with its JSON text in bytes. */
export type RunDecision = (input: DecideInput) => Promise<Uint8Array<ArrayBuffer>>;

const runDecision: RunDecision = (input) => runInThread('decide-thread', input);

/** The answer to a decision; large ones are worked out in a thread. */
export async function respondWithDecision(
  input: DecideInput,
  run: RunDecision = runDecision,
): Promise<Response> {
  const body = figuresOf(input) <= MOST_AT_ONCE ? decisionBytes(input) : await run(input);
  return new Response(body, { headers: { 'content-type': 'application/json', 'cache-control': 'no-store' } });
}

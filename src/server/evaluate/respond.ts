import type { EvaluateInput } from '#contract/evaluate.ts';
import { evaluate } from '#contract/flights.ts';
import { json } from '#server/endpoint.ts';
import { evaluationPieces } from './evaluation-stream.ts';

/** Up to this many results the main thread answers by itself: some milliseconds. */
const MOST_AT_ONCE = 500;

/** The answer to an evaluation; large ones are worked out in threads and sent as they come. */
export async function respondWithEvaluation(
  input: EvaluateInput,
  head: Readonly<Record<string, number>> = {},
): Promise<Response> {
  if (input.sites.length * input.orbits.length <= MOST_AT_ONCE) {
    return json({ ...head, sites: evaluate(input) });
  }
  const opening = `${JSON.stringify({ ...head, sites: [] }).slice(0, -2)}`;
  const pieces = evaluationPieces(input, opening);
  // The first piece is awaited here, so that a failure is still an answer of its own.
  const first = await pieces.next();
  const body = new ReadableStream<Uint8Array>({
    start(controller) {
      if (!first.done) controller.enqueue(first.value);
    },
    async pull(controller) {
      const { done, value } = await pieces.next();
      if (done) controller.close();
      else controller.enqueue(value);
    },
    async cancel() {
      await pieces.return(undefined);
    },
  });
  return new Response(body, {
    headers: { 'content-type': 'application/json', 'cache-control': 'no-store' },
  });
}

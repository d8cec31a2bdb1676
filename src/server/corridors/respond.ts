import type { CorridorInput } from '#contract/corridor.ts';
import { runInThread } from '#server/threads.ts';

/** Surveys a corridor off the main thread and answers with its GeoJSON text in bytes. */
export type RunCorridor = (input: CorridorInput) => Promise<Uint8Array<ArrayBuffer>>;

const runCorridor: RunCorridor = (input) => runInThread('corridor-thread', input);

/** The answer to a corridor: it is always worked out in a thread, where the world's land and people are kept. */
export async function respondWithCorridor(
  input: CorridorInput,
  run: RunCorridor = runCorridor,
): Promise<Response> {
  return new Response(await run(input), {
    headers: { 'content-type': 'application/geo+json', 'cache-control': 'no-store' },
  });
}

import type { AscentInput } from '#contract/ascent.ts';
import { runInThread } from '#server/threads.ts';

/** Flies an ascent off the main thread and answers with its JSON text in bytes. */
export type RunAscent = (input: AscentInput) => Promise<Uint8Array<ArrayBuffer>>;

const runAscent: RunAscent = (input) => runInThread('ascent-thread', input);

/** The answer to an ascent: some milliseconds of a thread, up to a second where many starts are tried. */
export async function respondWithAscent(input: AscentInput, run: RunAscent = runAscent): Promise<Response> {
  return new Response(await run(input), {
    headers: { 'content-type': 'application/json', 'cache-control': 'no-store' },
  });
}

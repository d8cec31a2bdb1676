import { runInThread } from '#server/threads.ts';
import { respondWithCorridor } from '#server/corridors/respond.ts';
import type { DownrangeTask } from './tasks.ts';

/** Works a task out off the main thread and answers with its JSON text in bytes. */
export type RunDownrange = (task: DownrangeTask) => Promise<Uint8Array<ArrayBuffer>>;

// The corridors' threads keep the world's land and people already.
const runDownrange: RunDownrange = (task) => runInThread('corridor-thread', task);

export async function respondWithDownrange(
  task: DownrangeTask,
  run: RunDownrange = runDownrange,
): Promise<Response> {
  return new Response(await run(task), {
    headers: { 'content-type': 'application/json', 'cache-control': 'no-store' },
  });
}

/** The corridor alone as a file: what POST /api/v1/corridors answers for the same input. */
export async function respondWithCorridorFile({
  input,
  siteCode,
}: DownrangeTask & { kind: 'corridor' }): Promise<Response> {
  const response = await respondWithCorridor(input);
  const name = `corridor-${siteCode}-${input.azimuthDeg}.geojson`;
  response.headers.set('content-disposition', `attachment; filename="${name}"`);
  return response;
}

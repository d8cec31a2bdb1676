import type { SensitivityQuery } from '#contract/sensitivity.ts';
import type { SensitivityTask } from '#contract/sensitivity-model.ts';
import type { PooledDb } from '#db/client.ts';
import { runInThread } from '#server/threads.ts';
import { rankingFigures } from './figures.ts';
import { readSnapshot } from './read-snapshot.ts';

interface Asked {
  studyId: string;
  userId: string;
  query: SensitivityQuery;
}

/** Works out a sensitivity off the main thread and answers with its JSON text in bytes. */
export type RunSensitivity = (task: SensitivityTask) => Promise<Uint8Array<ArrayBuffer>>;

export const runSensitivity: RunSensitivity = (task) => runInThread('sensitivity-thread', task);

/** Whether a study's ranking holds, as JSON. @throws AppError 'not-found' */
export async function respondWithSensitivity(
  db: PooledDb,
  { query: { weights, ...query }, ...asked }: Asked,
  run: RunSensitivity = runSensitivity,
): Promise<Response> {
  const snapshot = await readSnapshot(db, asked);
  const statement = weights === 'mine' ? snapshot.mine : snapshot.study;
  const body = await run({ figures: rankingFigures(snapshot), statement, weights, query });
  return new Response(body, { headers: { 'content-type': 'application/json', 'cache-control': 'no-store' } });
}

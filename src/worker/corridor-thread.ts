import { move } from 'piscina';
import type { CorridorInput } from '#contract/corridor.ts';
import { corridorCollection } from '#server/corridors/present.ts';
import { loadWorld } from '#server/corridors/world.ts';
import { answerDownrange } from '#server/downrange/answer.ts';
import type { DownrangeTask } from '#server/downrange/tasks.ts';

/**
 * Entry of a worker thread: a corridor's input in, its GeoJSON text in bytes, or a task of a study's Downrange section
 * in, its JSON text; handed over without a copy. One thread for both: each keeps the world's land and people.
 */
export default async function corridorThread(task: CorridorInput | DownrangeTask): Promise<Uint8Array> {
  const world = await loadWorld();
  const answer = 'kind' in task ? answerDownrange(world, task) : corridorCollection(world, task);
  return move(new TextEncoder().encode(JSON.stringify(answer))) as Uint8Array;
}

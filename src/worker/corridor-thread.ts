import { move } from 'piscina';
import type { CorridorInput } from '#contract/corridor.ts';
import { corridorCollection } from '#server/corridors/present.ts';
import { loadWorld } from '#server/corridors/world.ts';

/** Entry of a worker thread: a corridor's input in, its GeoJSON text in bytes, handed over without a copy. */
export default async function corridorThread(input: CorridorInput): Promise<Uint8Array> {
  const collection = corridorCollection(await loadWorld(), input);
  return move(new TextEncoder().encode(JSON.stringify(collection))) as Uint8Array;
}

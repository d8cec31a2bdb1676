import { newId } from '#db/columns.ts';
import type { PairTask } from './input-hash.ts';

/** Flights that one job carries: some tenths of a second of work, so that a lost job costs little. */
const MOST_IN_BATCH = 8;
/** Few flights are spread over as many jobs as are likely to be flown at once. */
const SPREAD = 16;

export interface Batch {
  id: string;
  hashes: string[];
}

/** Flights in batches of neighbours: by orbit, then from south to north. */
export function batchesOf(tasks: readonly PairTask[]): Batch[] {
  const sorted = [...tasks].sort(
    (a, b) =>
      (a.orbitId < b.orbitId ? -1 : Number(a.orbitId > b.orbitId)) ||
      a.task.site.latitudeDeg - b.task.site.latitudeDeg,
  );
  const size = Math.min(MOST_IN_BATCH, Math.max(1, Math.ceil(sorted.length / SPREAD)));
  const batches: Batch[] = [];
  for (let at = 0; at < sorted.length; at += size)
    batches.push({ id: newId(), hashes: sorted.slice(at, at + size).map(({ hash }) => hash) });
  return batches;
}

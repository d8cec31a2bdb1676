import { sql } from 'drizzle-orm';
import type { Db, PooledDb } from '#db/client.ts';
import { insertLibraryVehicle, listLibraryVehicles } from '#db/queries/vehicle.ts';
import { writeRecord } from '#server/change-study.ts';
import { LIBRARY_VEHICLES } from './library.ts';

/** Anyone may load at any time: whoever comes second waits here and then finds it done. */
const SEED_LOCK = 20_310_402;
export const lockSeed = (tx: Db) => tx.execute(sql`select pg_advisory_xact_lock(${SEED_LOCK})`);

export async function fillLibrary(tx: Db): Promise<void> {
  const { total } = await listLibraryVehicles(tx, { query: '', page: 1, pageSize: 1, archived: true });
  if (total > 0) return;
  for (const vehicle of LIBRARY_VEHICLES) {
    const { id } = await insertLibraryVehicle(tx, vehicle);
    await writeRecord(tx, { studyId: null, userId: null, revision: null }, [
      { object: 'library-vehicle', objectId: id, action: 'add', to: vehicle },
    ]);
  }
}

/** Gives an installation its first library vehicles; a library that has, or had, any stays as it is. */
export async function loadLibrary(db: PooledDb): Promise<void> {
  await db.transaction(async (tx) => {
    await lockSeed(tx);
    await fillLibrary(tx);
  });
}

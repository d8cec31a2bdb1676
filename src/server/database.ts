import { openDatabase, type PooledDb } from '#db/client.ts';
import { env } from '#server/env.ts';
import { onStop } from '#server/lifecycle.ts';

let opened: PooledDb | undefined;

/** The web process's one pool, with the app's role. */
export function database(): PooledDb {
  if (!opened) {
    const db = openDatabase(env().DATABASE_URL);
    onStop(() => db.$client.end());
    opened = db;
  }
  return opened;
}

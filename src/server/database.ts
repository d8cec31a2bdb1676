import { openDatabase, type PooledDb } from '#db/client.ts';
import { readDatabaseUrl } from '#server/env.ts';
import { onStop } from '#server/lifecycle.ts';

let opened: PooledDb | undefined;

/** The process's one pool, with the app's role. */
export function database(): PooledDb {
  if (!opened) {
    const db = openDatabase(readDatabaseUrl());
    onStop(() => db.$client.end());
    opened = db;
  }
  return opened;
}

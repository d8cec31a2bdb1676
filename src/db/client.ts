import { drizzle, type NodePgDatabase, type NodePgTransaction } from 'drizzle-orm/node-postgres';
import type { ExtractTablesWithRelations } from 'drizzle-orm';
import type pg from 'pg';
import { EnduringPool } from './pool.ts';
import * as ascent from './schema/ascent.ts';
import * as auth from './schema/auth.ts';
import * as criterion from './schema/criterion.ts';
import * as mail from './schema/mail.ts';
import * as record from './schema/record.ts';
import * as site from './schema/site.ts';
import * as study from './schema/study.ts';

export const schema = { ...auth, ...study, ...site, ...criterion, ...record, ...mail, ...ascent };
type Schema = typeof schema;

/** What queries take: a pool's database or a transaction, so that the same query serves both. */
export type Db = NodePgDatabase<Schema> | NodePgTransaction<Schema, ExtractTablesWithRelations<Schema>>;
export type PooledDb = NodePgDatabase<Schema> & { $client: pg.Pool };

/**
 * Opens a pool. A connection that breaks (the database restarts) is dropped and replaced at the next query, so the app
 * comes back with the database.
 */
export function openDatabase(url: string, max = 10): PooledDb {
  const pool = new EnduringPool({
    connectionString: url,
    max,
    connectionTimeoutMillis: 5_000,
    keepAlive: true,
  });
  return drizzle(pool, { schema });
}

import { randomUUID } from 'node:crypto';
import { afterAll } from 'vitest';
import { openDatabase, type PooledDb } from '#db/client.ts';
import { APP_ROLE, Cluster, OWNER_ROLE } from '#scripts/cluster.ts';
import { DATA_VARIABLE, TEMPLATE } from './template.ts';

export interface TestDatabase {
  /** As the app's role, as in production. */
  db: PooledDb;
  appUrl: string;
  /** As the owner, for what a test arranges that the app may not do. */
  ownerUrl: string;
}

/**
 * A migrated, empty database of this test file alone, dropped when the file is done. `env()` and `database()` of the
 * server find it too. Call it once, at the top of the file.
 */
export async function testDatabase(): Promise<TestDatabase> {
  const data = process.env[DATA_VARIABLE];
  if (!data) throw new Error('testDatabase() works in the vitest project "db" only.');
  const cluster = await Cluster.open({ data, durable: false });
  const name = `test_${randomUUID().replaceAll('-', '')}`;
  await cluster.makeDatabase(name, TEMPLATE);
  const appUrl = cluster.url(APP_ROLE, name);
  Object.assign(process.env, {
    DATABASE_URL: appUrl,
    BETTER_AUTH_SECRET: 'secret of the tests, worth nothing',
  });
  const db = openDatabase(appUrl, 4);
  afterAll(async () => {
    await db.$client.end();
    await cluster.dropDatabase(name);
    await cluster.stop();
  });
  return { db, appUrl, ownerUrl: cluster.url(OWNER_ROLE, name) };
}

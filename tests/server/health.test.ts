import { afterAll, expect, test, vi } from 'vitest';
import { APP_ROLE } from '#scripts/cluster.ts';
import { openTestCluster } from '#scripts/test-cluster.ts';

// A cluster of this file's own, because it is taken away.
const { cluster, close } = await openTestCluster();
await cluster.makeDatabase('health');
Object.assign(process.env, {
  DATABASE_URL: cluster.url(APP_ROLE, 'health'),
  BETTER_AUTH_SECRET: 'secret of the tests, worth nothing',
});
const { database } = await import('#server/database.ts');
const { checkHealth } = await import('#server/health.ts');

afterAll(async () => {
  await database().$client.end();
  await close();
});

test('the app goes away and comes back with the database, with the same pool', async () => {
  expect(await checkHealth()).toEqual({ status: 'ok', database: 'up' });
  cluster.interrupt();
  expect(await checkHealth()).toEqual({ status: 'unavailable', database: 'away' });
  await cluster.resume();
  expect(await checkHealth()).toEqual({ status: 'ok', database: 'up' });
});

test('a database that hangs counts as away', async () => {
  const silent = vi.spyOn(database().$client, 'query').mockReturnValue(new Promise(() => undefined) as never);
  expect(await checkHealth()).toEqual({ status: 'unavailable', database: 'away' });
  silent.mockRestore();
});

/*
 * What the browser tests run against: the built app, a cluster in the folder that SPINWARD_DATA names, and a fresh
 * database with the demo. Ends, and takes the cluster with it, at SIGTERM.
 */
import fs from 'node:fs';
import path from 'node:path';
import { readStartEnv } from '#server/env.ts';
import { buildIfChanged } from './build.ts';
import { runNode, serveNode, stopChildren } from './child.ts';
import { APP_ROLE, Cluster, OWNER_ROLE } from './cluster.ts';
import { stopInOrder } from './graceful.ts';
import { migrateDatabase } from './migrate.ts';

const { SPINWARD_DATA } = readStartEnv();
const DATABASE = 'browser_tests';

await buildIfChanged();
const cluster = await Cluster.open({ data: SPINWARD_DATA, durable: false });
stopInOrder(async () => {
  await stopChildren();
  await cluster.stop();
  fs.rmSync(SPINWARD_DATA, { recursive: true, force: true });
});
await cluster.makeDatabase(DATABASE);
const urls = { app: cluster.url(APP_ROLE, DATABASE), owner: cluster.url(OWNER_ROLE, DATABASE) };
await migrateDatabase({ ownerUrl: urls.owner, appRole: APP_ROLE });
const env = {
  DATABASE_URL: urls.app,
  DATABASE_MIGRATE_URL: urls.owner,
  BETTER_AUTH_SECRET: 'secret of the tests, worth nothing',
  SPINWARD_DEMO: '1',
};
await runNode(['--import', 'tsx', path.join('seed', 'run.ts')], env, 'Seeding the demo');
await serveNode(['--enable-source-maps', 'dist/web.mjs'], { ...env, NODE_ENV: 'production' });

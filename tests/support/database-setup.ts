import { APP_ROLE, OWNER_ROLE } from '#scripts/cluster.ts';
import { migrateDatabase } from '#scripts/migrate.ts';
import { openTestCluster } from '#scripts/test-cluster.ts';
import { DATA_VARIABLE, TEMPLATE } from './template.ts';

/** Once a run: a cluster in a temporary folder, with one migrated database to copy. */
export default async function setup(): Promise<() => Promise<void>> {
  const { cluster, data, close } = await openTestCluster();
  await cluster.makeDatabase(TEMPLATE);
  await migrateDatabase({ ownerUrl: cluster.url(OWNER_ROLE, TEMPLATE), appRole: APP_ROLE });
  process.env[DATA_VARIABLE] = data;
  return close;
}

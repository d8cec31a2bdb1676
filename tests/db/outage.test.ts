import { afterAll, expect, test, vi } from 'vitest';
import { sql } from 'drizzle-orm';
import { openDatabase } from '#db/client.ts';
import { APP_ROLE } from '#scripts/cluster.ts';
import { openTestCluster } from '#scripts/test-cluster.ts';

vi.setConfig({ testTimeout: 60_000, hookTimeout: 60_000 });

const { cluster, close } = await openTestCluster();
await cluster.makeDatabase('outage');
const CONNECTIONS = 2;
const db = openDatabase(cluster.url(APP_ROLE, 'outage'), CONNECTIONS);
afterAll(async () => {
  await db.$client.end();
  await close();
});

test('a restart amid transactions costs the pool no connection', async () => {
  for (let outage = 0; outage < 2; outage++) {
    let reached = 0;
    let goOn: () => void = () => undefined;
    const restarted = new Promise<void>((resolve) => (goOn = resolve));
    const broken = Array.from({ length: CONNECTIONS }, () =>
      db.transaction(async (tx) => {
        await tx.execute(sql`select 1`);
        reached += 1;
        await restarted;
        await tx.execute(sql`select 2`);
      }),
    );
    await vi.waitFor(() => expect(reached).toBe(CONNECTIONS));
    cluster.interrupt();
    await expect(db.transaction(async () => undefined)).rejects.toThrow();
    await cluster.resume();
    goOn();
    for (const { status } of await Promise.allSettled(broken)) expect(status).toBe('rejected');
  }
  const again = Array.from({ length: CONNECTIONS }, () =>
    db.transaction((tx) => tx.execute(sql`select 3 as n`)),
  );
  for (const { rows } of await Promise.all(again)) expect(rows).toEqual([{ n: 3 }]);
});

test('a transaction that cannot begin gives its connection back', async () => {
  for (let i = 0; i < 2 * CONNECTIONS; i++) {
    // It ends just as it is taken, so that the transaction's first statement finds it broken.
    db.$client.once('acquire', (client) => void client.end());
    await expect(db.transaction((tx) => tx.execute(sql`select 1`))).rejects.toThrow();
  }
  const { rows } = await db.transaction((tx) => tx.execute(sql`select 4 as n`));
  expect(rows).toEqual([{ n: 4 }]);
});

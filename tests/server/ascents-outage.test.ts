import { spawn, type ChildProcess } from 'node:child_process';
import { afterAll, expect, test, vi } from 'vitest';
import { AscentsQuery } from '#contract/study-ascents.ts';
import { openDatabase } from '#db/client.ts';
import { APP_ROLE, OWNER_ROLE } from '#scripts/cluster.ts';
import { migrateDatabase } from '#scripts/migrate.ts';
import { openTestCluster } from '#scripts/test-cluster.ts';
import { flownStudy } from '#tests/support/flown-study.ts';

/*
 * Two worker processes on a cluster of their own; one of them is killed in mid-flight, then the database is restarted
 * under the other. A lost lease runs out after LEASE_SECONDS, so the test takes some 20 s.
 */

vi.setConfig({ testTimeout: 90_000, hookTimeout: 60_000 });

const DATABASE = 'outage';
const { cluster, close } = await openTestCluster({ durable: true });
await cluster.makeDatabase(DATABASE);
await migrateDatabase({ ownerUrl: cluster.url(OWNER_ROLE, DATABASE), appRole: APP_ROLE });
const url = cluster.url(APP_ROLE, DATABASE);
process.env['DATABASE_URL'] = url;
const db = openDatabase(url, 4);
const { askAscents } = await import('#server/ascents/ask-ascents.ts');
const { readAscents } = await import('#server/ascents/read-ascents.ts');
const { stopAll } = await import('#server/lifecycle.ts');

interface Worker {
  child: ChildProcess;
  /** Latitudes of the flights begun and flown, in order. */
  begun: number[];
  flown: number[];
}

const started: ChildProcess[] = [];

function startWorker(): Worker {
  const child = spawn(process.execPath, ['--import', 'tsx', 'tests/support/stand-in-worker.ts'], {
    env: { ...process.env, DATABASE_URL: url },
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  started.push(child);
  const worker: Worker = { child, begun: [], flown: [] };
  let text = '';
  child.stdout.setEncoding('utf8').on('data', (chunk: string) => {
    const lines = (text + chunk).split('\n');
    text = lines.pop() ?? '';
    for (const line of lines) {
      const [what, latitude] = line.split(' ');
      worker[what === 'begun' ? 'begun' : 'flown'].push(Number(latitude));
    }
  });
  return worker;
}

const ended = (child: ChildProcess): Promise<number | null> =>
  new Promise((resolve) => child.once('exit', (code) => resolve(code)));

afterAll(async () => {
  for (const child of started) if (child.exitCode === null) child.kill('SIGKILL');
  await stopAll();
  await db.$client.end();
  await close();
});

const SITES = 40;

test('a killed worker and a restarted database lose nothing, and nothing is flown twice', async () => {
  const { member } = await flownStudy(db, { latitudesDeg: Array.from({ length: SITES }, (_, i) => i) });
  const { studyId } = member;
  const counts = async () =>
    (await readAscents(db, { studyId, query: AscentsQuery.parse({ list: 'false' }) })).counts;
  const wait = (look: () => void | Promise<void>) => vi.waitFor(look, { timeout: 40_000, interval: 20 });

  /** Waits until a flight has just begun, so that what comes next meets it in the air. */
  const takeOff = ({ begun }: Worker) => {
    const before = begun.length;
    return wait(() => expect(begun.length).toBeGreaterThan(before));
  };

  await askAscents(db, { member, input: {} });
  const [killed, survivor] = [startWorker(), startWorker()];
  await wait(() => {
    expect(killed.flown.length).toBeGreaterThan(2);
    expect(survivor.flown.length).toBeGreaterThan(2);
  });
  await takeOff(killed);
  killed.child.kill('SIGKILL');
  await ended(killed.child);
  const inTheAir = killed.begun.slice(killed.flown.length);
  expect(inTheAir).toHaveLength(1);

  await takeOff(survivor);
  cluster.interrupt();
  expect((await counts().catch(() => undefined))?.current).toBeUndefined();
  await cluster.resume();

  await wait(async () => expect((await counts()).current).toBe(SITES));
  const flown = [...killed.flown, ...survivor.flown].sort((a, b) => a - b);
  // A result that was flown but not yet kept when its process was killed is the one that may be flown again.
  const again = flown.filter((latitude, i) => latitude === flown[i - 1]);
  expect(again.filter((latitude) => latitude !== killed.flown.at(-1))).toEqual([]);
  expect(new Set(flown).size).toBe(SITES);
  expect(survivor.flown).toContain(inTheAir[0]);

  await wait(async () => {
    const { rows } = await db.execute(`select distinct state from pgboss.job where name = 'ascents'`);
    expect(rows).toEqual([{ state: 'completed' }]);
  });
  survivor.child.kill('SIGTERM');
  expect(await ended(survivor.child)).toBe(0);
});

import { spawn, spawnSync } from 'node:child_process';
import { eq } from 'drizzle-orm';
import { expect, test, vi } from 'vitest';
import { AscentsQuery } from '#contract/study-ascents.ts';
import { site } from '#db/schema/site.ts';
import { APP_ROLE } from '#scripts/cluster.ts';
import { testDatabase } from '#tests/support/database.ts';
import { flownStudy } from '#tests/support/flown-study.ts';

// Checks the packages, bundles and flies: some seconds, more beside other tests.
vi.setConfig({ testTimeout: 90_000 });

const { db, appUrl } = await testDatabase();
const { askAscents } = await import('#server/ascents/ask-ascents.ts');
const { readAscent, readAscents } = await import('#server/ascents/read-ascents.ts');

const COMMAND = [process.execPath, 'scripts/worker.mjs'] as const;
const start = (DATABASE_URL: string) =>
  spawnSync(COMMAND[0], [COMMAND[1]], { encoding: 'utf8', env: { ...process.env, DATABASE_URL } });

test('a worker process flies what a study asks for, and ends in order when it is asked to', async () => {
  const { member, siteIds, orbitIds } = await flownStudy(db, { latitudesDeg: [5, 28] });
  // A place from which no turn of 60° leads to the orbit: an answer with its reason, not a failure.
  await db
    .update(site)
    .set({ permittedAzimuthsDeg: [[240, 260]] })
    .where(eq(site.id, siteIds[1] ?? ''));
  const { studyId } = member;
  await askAscents(db, { member, input: {} });
  const worker = spawn(COMMAND[0], [COMMAND[1]], {
    env: { ...process.env, DATABASE_URL: appUrl },
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  const ended = new Promise<number | null>((resolve) => worker.once('exit', resolve));
  let said = '';
  worker.stdout.setEncoding('utf8').on('data', (text: string) => (said += text));
  const read = () => readAscents(db, { studyId, query: AscentsQuery.parse({}) });
  await vi.waitFor(async () => expect((await read()).counts.current).toBe(2), { timeout: 60_000 });
  worker.kill('SIGTERM');
  expect(await ended).toBe(0);
  expect(said).toContain(`Flying ascents for the studies of ${new URL(appUrl).host}/`);
  expect(said).toContain('Stopping after the flights under way');
  expect(said).not.toContain(new URL(appUrl).password);

  const flown = await readAscent(db, { studyId, siteId: siteIds[0] ?? '', orbitId: orbitIds[0] ?? '' });
  expect(flown.figures).toMatchObject({ converged: true, reason: null });
  expect(flown.trajectory.length).toBeGreaterThan(20);
  expect((await read()).items[1]?.figures).toMatchObject({ converged: false, reason: 'out-of-reach' });
});

test('a worker that cannot start says why, and ends with 1', async () => {
  const without = start('');
  expect(without.status).toBe(1);
  expect(without.stderr).toContain('DATABASE_URL must be set');
  const empty = new URL(appUrl);
  empty.pathname = '/postgres';
  expect(empty.username).toBe(APP_ROLE);
  const unmigrated = start(empty.href);
  expect(unmigrated.status).toBe(1);
  expect(unmigrated.stderr).toContain('is not at this version yet');
  empty.port = '1';
  expect(start(empty.href).stderr).toContain(`The database at 127.0.0.1:1/postgres does not answer`);
});

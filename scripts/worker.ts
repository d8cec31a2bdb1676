/*
 * A worker process, built to dist/worker.mjs: flies ascents that studies ask for and does nothing else. Any number of
 * them, on any number of machines, share one queue; what one of them leaves undone when it is killed, another takes
 * up. Run by scripts/worker.mjs, or from the project's folder as it is: node dist/worker.mjs
 */
import { sql } from 'drizzle-orm';
import { flyInThread } from '#server/ascents/fly-in-thread.ts';
import { MOST_AT_ONCE, workAscents } from '#server/ascents/work-ascents.ts';
import { database } from '#server/database.ts';
import { EnvError, readDatabaseUrl } from '#server/env.ts';
import { stopAll } from '#server/lifecycle.ts';
import { stopInOrder } from './graceful.ts';

/** Whom the work is for, without the password. */
function placeOf(url: string): string {
  const { host, pathname } = new URL(url);
  return `${host}${pathname}`;
}

/** @throws Error that says what to do where the database is away or was not migrated to this version */
async function checkDatabase(place: string): Promise<void> {
  const asked = sql`select to_regclass('ascent') is not null and to_regclass('pgboss.queue') is not null as ready`;
  const { rows } = await database()
    .execute<{ ready: boolean }>(asked)
    .catch((error: Error) => {
      const reason = error.cause instanceof Error ? error.cause.message : error.message;
      throw new Error(`The database at ${place} does not answer: ${reason}`);
    });
  if (!rows[0]?.ready)
    throw new Error(
      `The database at ${place} is not at this version yet. Start the server of this version against it first: it migrates.`,
    );
}

async function run(): Promise<void> {
  const place = placeOf(readDatabaseUrl());
  await checkDatabase(place);
  const worker = workAscents({ db: database(), fly: flyInThread });
  stopInOrder(async () => {
    console.log('Stopping after the flights under way; what is left goes back to the queue.');
    await worker.stop();
    await stopAll();
  });
  const flights = MOST_AT_ONCE === 1 ? 'one flight' : `${MOST_AT_ONCE} flights`;
  console.log(`Flying ascents for the studies of ${place}, ${flights} at a time. Ctrl-C stops it.`);
}

try {
  await run();
} catch (error) {
  const { message } = error as Error;
  const hint = 'npm start flies the ascents of its private database by itself.';
  console.error(error instanceof EnvError ? `The worker does not start:\n${message}\n${hint}` : message);
  process.exit(1);
}

/*
 * A worker process whose flights are a stand-in's, for tests that kill it. It says on its standard output when a
 * flight is in the air and when it is flown. Run by: node --import tsx tests/support/stand-in-worker.ts
 */
import { stopInOrder } from '#scripts/graceful.ts';
import { workAscents } from '#server/ascents/work-ascents.ts';
import { database } from '#server/database.ts';
import { stopAll } from '#server/lifecycle.ts';
import { standInFlight } from './stand-in-flight.ts';

const FLIGHT_MS = 200;

const worker = workAscents({
  db: database(),
  atOnce: 1,
  fly: async (task) => {
    const { latitudeDeg } = task.site;
    process.stdout.write(`begun ${latitudeDeg}\n`);
    const outcome = await standInFlight(task, FLIGHT_MS);
    process.stdout.write(`flown ${latitudeDeg}\n`);
    return outcome;
  },
});
stopInOrder(async () => {
  await worker.stop();
  await stopAll();
});

/*
 * The contributor's server, built to dist/dev.mjs: Astro's own development server with reload, in place of the front
 * and the built pages.
 */
import { dev } from 'astro';
import { flyInThread } from '#server/ascents/fly-in-thread.ts';
import { workAscents } from '#server/ascents/work-ascents.ts';
import { database } from '#server/database.ts';
import { env } from '#server/env.ts';
import { workJobs } from '#server/jobs/boss.ts';
import { stopAll } from '#server/lifecycle.ts';
import { deliverMail } from '#server/mail/deliver.ts';
import { stopInOrder } from './graceful.ts';

const { HOST, PORT } = env();
const server = await dev({ root: process.cwd(), server: { host: HOST, port: PORT } });
const ascents = workAscents({ db: database(), fly: flyInThread });
stopInOrder(async () => {
  await server.stop();
  await ascents.stop();
  await stopAll();
});
await workJobs('mail', deliverMail);
process.send?.('ready');

/*
 * The contributor's server, built to dist/dev.mjs: Astro's own development server with reload, in place of the front
 * and the built pages.
 */
import { dev } from 'astro';
import { env } from '#server/env.ts';
import { workJobs } from '#server/jobs/boss.ts';
import { stopAll } from '#server/lifecycle.ts';
import { deliverMail } from '#server/mail/deliver.ts';
import { stopInOrder } from './graceful.ts';

const { HOST, PORT } = env();
const server = await dev({ root: process.cwd(), server: { host: HOST, port: PORT } });
stopInOrder(async () => {
  await server.stop();
  await stopAll();
});
await workJobs('mail', deliverMail);
process.send?.('ready');

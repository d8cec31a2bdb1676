/*
 * The web process, built to dist/web.mjs: the front, Astro's handler behind it, and its share of the queued work.
 * scripts/serve.ts starts it with the environment complete.
 */
import { fileURLToPath } from 'node:url';
import { flyInThread } from '#server/ascents/fly-in-thread.ts';
import { workAscents } from '#server/ascents/work-ascents.ts';
import { database } from '#server/database.ts';
import { env } from '#server/env.ts';
import { workJobs } from '#server/jobs/boss.ts';
import { stopAll } from '#server/lifecycle.ts';
import { deliverMail } from '#server/mail/deliver.ts';
import { makeFront, type Handler } from './front.ts';
import { closable, stopInOrder } from './graceful.ts';

process.env['ASTRO_NODE_AUTOSTART'] = 'disabled';
const settings = env();

const built = new URL('./server/entry.mjs', import.meta.url).href;
const { handler } = (await import(built)) as { handler: Handler };
const clientFolder = fileURLToPath(new URL('./client', import.meta.url));
const server = makeFront({ settings, handler, clientFolder });
const close = closable(server);

server.once('error', (error: NodeJS.ErrnoException) => {
  const taken = `Port ${settings.PORT} of ${settings.HOST} is taken. Choose another: PORT=4322 npm start`;
  console.error(error.code === 'EADDRINUSE' ? taken : error.message);
  process.exit(1);
});
const ascents = workAscents({ db: database(), fly: flyInThread });
stopInOrder(async () => {
  await close();
  await ascents.stop();
  await stopAll();
});
await workJobs('mail', deliverMail);
server.listen(settings.PORT, settings.HOST, () => process.send?.('ready'));

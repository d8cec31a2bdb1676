import path from 'node:path';
import { parseArgs } from 'node:util';
import { loadLibrary } from '#seed/load-library.ts';
import { EnvError, publicOrigin, readStartEnv, type StartEnv } from '#server/env.ts';
import { anotherAdministrator, firstAdministrator } from './administrator.ts';
import { buildIfChanged, buildWorkers } from './build.ts';
import { runNode, serveNode, stopChildren, type Env } from './child.ts';
import { openConnections, readContents, sessionSecret, withDatabase, type Connections } from './database.ts';
import { DEMO_DOMAIN, DEMO_PASSWORD, DEMO_PEOPLE, refuseHost, shouldSeed, type Contents } from './demo.ts';
import { stopInOrder } from './graceful.ts';
import { migrateDatabase, roleOf } from './migrate.ts';
import { portIsFree } from './ports.ts';

interface Flags {
  dev: boolean;
  admin?: string | undefined;
}

function readFlags(args: readonly string[]): Flags {
  const options = { dev: { type: 'boolean' }, admin: { type: 'boolean' } } as const;
  const { values, positionals } = parseArgs({ args: [...args], options, allowPositionals: true });
  if (values.admin && !positionals[0]?.includes('@'))
    throw new Error('Name the address: npm run admin -- someone@example.org');
  return { dev: values.dev ?? false, admin: values.admin ? positionals[0] : undefined };
}

/** What the seed, the web process and its workers are told. */
const childEnv = (settings: StartEnv, { appUrl, ownerUrl }: Connections, contents: Contents): Env => ({
  DATABASE_URL: appUrl,
  DATABASE_MIGRATE_URL: ownerUrl,
  BETTER_AUTH_SECRET: sessionSecret(settings),
  SPINWARD_DATA: path.resolve(settings.SPINWARD_DATA),
  SPINWARD_DEMO: contents.hasDemo ? '1' : '0',
});

/** Gives an empty database its beginning: the demo, or the vehicle library alone. Each is one transaction. */
async function seed(settings: StartEnv, connections: Connections, contents: Contents): Promise<void> {
  if (!contents.isEmpty) return;
  const demo = shouldSeed(settings, contents);
  if (demo) console.log('Seeding the demo…');
  const args = ['--import', 'tsx', 'seed/run.ts', ...(demo ? [] : ['--library-only'])];
  await runNode(args, childEnv(settings, connections, contents), 'Filling the empty database');
}

/** Everything between a database that answers and one that is ready to be served. */
async function prepareDatabase(settings: StartEnv, connections: Connections): Promise<Contents> {
  await migrateDatabase({ ownerUrl: connections.ownerUrl, appRole: roleOf(connections.appUrl) });
  const contents = await readContents(connections.appUrl);
  const refused = refuseHost(settings, contents);
  if (refused) throw new Error(refused);
  await seed(settings, connections, contents);
  await withDatabase(connections.appUrl, loadLibrary);
  return readContents(connections.appUrl);
}

async function announce(settings: StartEnv, appUrl: string, contents: Contents): Promise<void> {
  const origin = publicOrigin(settings);
  console.log(`\nSpinward is at ${origin}`);
  if (contents.hasDemo) {
    const people = DEMO_PEOPLE.map((name) => `${name}@${DEMO_DOMAIN}`).join(', ');
    console.log(`Demo sign-ins: ${people}\nPassword of each: ${DEMO_PASSWORD}`);
  }
  if (contents.isEmpty) {
    const link = await withDatabase(appUrl, (db) => firstAdministrator(db, origin));
    console.log(
      `Nobody has an account yet. This link makes the first administrator; it works once, for a day:\n  ${link}`,
    );
  }
  console.log('Ctrl-C stops it.\n');
}

/** Serves until asked to stop; the answer comes only where it fails before. */
async function serve(settings: StartEnv, connections: Connections, dev: boolean): Promise<void> {
  const contents = await prepareDatabase(settings, connections);
  await (dev ? buildWorkers() : buildIfChanged());
  const env = childEnv(settings, connections, contents);
  const mode = { NODE_ENV: dev ? 'development' : 'production' };
  const web = await serveNode(['--enable-source-maps', dev ? 'dist/dev.mjs' : 'dist/web.mjs'], {
    ...env,
    ...mode,
  });
  web.once('exit', (code) => {
    if (code === 0) return;
    console.error('The server ended by itself; everything else is stopped.');
    process.exitCode = 1;
    process.kill(process.pid, 'SIGTERM');
  });
  await announce(settings, connections.appUrl, contents);
}

async function run(flags: Flags): Promise<void> {
  const settings = readStartEnv();
  const { admin } = flags;
  if (!admin && !(await portIsFree(settings.PORT, settings.HOST)))
    throw new Error(
      `Port ${settings.PORT} of ${settings.HOST} is taken. Choose another: PORT=4322 npm start`,
    );
  const connections = await openConnections(settings);
  const stop = async (): Promise<void> => {
    await stopChildren();
    await connections.close();
  };
  stopInOrder(stop);
  try {
    if (!admin) return await serve(settings, connections, flags.dev);
    await migrateDatabase({ ownerUrl: connections.ownerUrl, appRole: roleOf(connections.appUrl) });
    console.log(
      await withDatabase(connections.appUrl, (db) => anotherAdministrator(db, publicOrigin(settings), admin)),
    );
    await stop();
  } catch (error) {
    await stop();
    throw error;
  }
}

/** The start command. A reason to stop is told in a sentence; the process then ends with 1. */
export async function main(args: readonly string[]): Promise<void> {
  try {
    await run(readFlags(args));
  } catch (error) {
    console.error(
      error instanceof EnvError ? `Spinward does not start:\n${error.message}` : (error as Error).message,
    );
    process.exit(1);
  }
}

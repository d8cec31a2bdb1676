import { spawn, type ChildProcess } from 'node:child_process';
import { fileURLToPath } from 'node:url';

const ROOT = fileURLToPath(new URL('..', import.meta.url));
const LAST_RESORT_MS = 15_000;

export type Env = Readonly<Record<string, string | undefined>>;
const running = new Set<ChildProcess>();

function start(
  args: readonly string[],
  env: Env,
  stdio: 'inherit' | ['inherit', 'inherit', 'inherit', 'ipc'],
  detached: boolean,
): ChildProcess {
  const child = spawn(process.execPath, args, {
    cwd: ROOT,
    env: { ...process.env, ...env },
    stdio,
    detached,
  });
  running.add(child);
  child.once('exit', () => running.delete(child));
  return child;
}

/** Runs a Node program to its end. @throws Error when it fails, with what it was for */
export async function runNode(args: readonly string[], env: Env, what: string): Promise<void> {
  const child = start(args, env, 'inherit', false);
  const code = await new Promise<number | null>((resolve) => child.once('exit', resolve));
  if (code !== 0) throw new Error(`${what} did not finish; what it says stands above.`);
}

/**
 * Starts a Node program that serves, and waits until it says that it is ready. It stands in a process group of its
 * own, so that Ctrl-C reaches only its parent, which stops it in order; the channel to its parent tells it to stop
 * should the parent be killed.
 */
export async function serveNode(args: readonly string[], env: Env): Promise<ChildProcess> {
  const child = start(args, env, ['inherit', 'inherit', 'inherit', 'ipc'], true);
  await new Promise<void>((resolve, reject) => {
    child.once('message', () => resolve());
    child.once('exit', () => reject(new Error('The server did not start; why stands above.')));
  });
  return child;
}

/** Asks every program that still runs to stop, and waits until it has. */
export async function stopChildren(): Promise<void> {
  await Promise.all(
    [...running].map(async (child) => {
      const gone = new Promise((resolve) => child.once('exit', resolve));
      child.kill('SIGTERM');
      const timer = setTimeout(() => child.kill('SIGKILL'), LAST_RESORT_MS);
      await gone;
      clearTimeout(timer);
    }),
  );
}

import { spawnSync } from 'node:child_process';
import fs from 'node:fs';

const isRoot = (): boolean => process.getuid?.() === 0;

/** How this process may run a command as root; undefined when it can't. */
function asRoot(): string[] | undefined {
  if (isRoot()) return [];
  const sudo = spawnSync('sudo', process.stdin.isTTY ? ['-v'] : ['-n', 'true'], { stdio: 'inherit' });
  return sudo.status === 0 ? ['sudo'] : undefined;
}

function root(command: string[], input?: string): boolean {
  const [program = '', ...args] = [...(asRoot() ?? []), ...command];
  const stdio = [input === undefined ? 'ignore' : 'pipe', 'ignore', 'inherit'] as const;
  return spawnSync(program, args, { input, stdio: [...stdio] }).status === 0;
}

/** Through env, because sudo hands no environment on. */
const APT = ['env', 'DEBIAN_FRONTEND=noninteractive', 'apt-get'];

let listsAreFresh = false;

/** Installs Debian packages, saying so. @throws Error with what to do when this user may not. */
export function aptInstall(packages: readonly string[], why: string): void {
  const byHand = `apt-get install ${packages.join(' ')}`;
  if (!fs.existsSync('/usr/bin/apt-get'))
    throw new Error(
      `${why}, and this is no Debian system. Install ${packages.join(' and ')} and start again.`,
    );
  if (!asRoot())
    throw new Error(
      `${why}, and installing needs root. Run "${byHand}" as root (or through sudo), then again.`,
    );
  console.log(`${why}: installing ${packages.join(' and ')} from Debian (about a minute)…`);
  listsAreFresh ||= root([...APT, 'update', '-qq']);
  if (!root([...APT, 'install', '-y', '-qq', '--no-install-recommends', ...packages]))
    throw new Error(`apt-get could not install ${packages.join(' and ')}. Run "${byHand}" to see why.`);
}

/** Keeps Debian's package from starting a cluster of its own on port 5432, which nobody asked for. */
export function withoutMainCluster(): void {
  aptInstall(['postgresql-common'], 'PostgreSQL is missing');
  const line = '\ncreate_main_cluster = false\n';
  if (!root(['tee', '-a', '/etc/postgresql-common/createcluster.conf'], line))
    throw new Error('The setting create_main_cluster = false could not be written.');
}

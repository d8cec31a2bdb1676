import { spawnSync, type SpawnSyncReturns } from 'node:child_process';
import fs from 'node:fs';
import path from 'node:path';
import { aptInstall, withoutMainCluster } from './debian.ts';

const DEBIAN_ROOT = '/usr/lib/postgresql';
const OLDEST = 15;

const majorOf = (bin: string): number => {
  const version = spawnSync(path.join(bin, 'postgres'), ['--version'], { encoding: 'utf8' }).stdout ?? '';
  return Number(/\s(\d+)/.exec(version)?.[1] ?? 0);
};

/** The programs of the wanted major version, or of the newest there is. */
function findBin(wanted?: number): string | undefined {
  const debian = fs.existsSync(DEBIAN_ROOT)
    ? fs.readdirSync(DEBIAN_ROOT).map((version) => path.join(DEBIAN_ROOT, version, 'bin'))
    : [];
  const onPath = (process.env['PATH'] ?? '').split(path.delimiter);
  return [...debian, ...onPath]
    .filter((bin) => fs.existsSync(path.join(bin, 'initdb')) && fs.existsSync(path.join(bin, 'postgres')))
    .map((bin) => ({ bin, major: majorOf(bin) }))
    .filter(({ major }) => (wanted ? major === wanted : major >= OLDEST))
    .sort((a, b) => b.major - a.major)[0]?.bin;
}

/**
 * The folder of PostgreSQL's server programs; installs Debian's when there is none.
 * @param wanted the major version an existing cluster was made by
 */
export function serverPrograms(wanted?: number): string {
  const found = findBin(wanted);
  if (found) return found;
  if (!findBin()) {
    withoutMainCluster();
    aptInstall(['postgresql'], 'PostgreSQL is missing');
  }
  const installed = findBin(wanted);
  if (!installed)
    throw new Error(
      wanted
        ? `The database was made by PostgreSQL ${wanted}, which is not installed here. Install it, or move the data.`
        : `PostgreSQL ${OLDEST} or later was not found, not even after installing it.`,
    );
  return installed;
}

export interface SystemUser {
  name: string;
  uid: number;
  gid: number;
  home: string;
}

/** The user a cluster has to belong to when this process is root, since PostgreSQL refuses to run as root. */
export function clusterUser(): SystemUser | undefined {
  if (process.getuid?.() !== 0) return undefined;
  const entry = spawnSync('getent', ['passwd', 'postgres'], { encoding: 'utf8' }).stdout ?? '';
  const [name, , uid, gid, , home] = entry.trim().split(':');
  if (!name || !home)
    throw new Error('There is no user "postgres" for the database to run as. Make one, then again.');
  return { name, uid: Number(uid), gid: Number(gid), home };
}

/** Runs a program as the cluster's user, from a folder that every user may enter. */
export function runAs(
  user: SystemUser | undefined,
  program: string,
  args: readonly string[],
): SpawnSyncReturns<string> {
  const command = user ? 'runuser' : program;
  const all = user ? ['-u', user.name, '--', program, ...args] : [...args];
  // A pipe would be inherited by the server that pg_ctl leaves running, and never close: output goes to its log.
  const stdio = path.basename(program) === 'pg_ctl' ? 'ignore' : 'pipe';
  return spawnSync(command, all, {
    cwd: '/',
    encoding: 'utf8',
    stdio,
    env: { PATH: process.env['PATH'], LC_ALL: 'C.UTF-8' },
  });
}

import { randomUUID } from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';
import { runAs, type SystemUser } from './postgres.ts';

/** Where a cluster lies, and the port it was last on. */
export interface Place {
  folder: string;
  port?: number | undefined;
}

/** The major version of PostgreSQL that made the cluster in a folder; undefined where there is none. */
export function majorOfCluster(folder: string | undefined): number | undefined {
  const file = path.join(folder ?? '', 'PG_VERSION');
  return folder && fs.existsSync(file) ? Number(fs.readFileSync(file, 'utf8')) : undefined;
}

/** Where a data folder's cluster lies, as kept there. */
export function readPlace(data: string): Place | undefined {
  const file = path.join(data, 'cluster.json');
  return fs.existsSync(file) ? (JSON.parse(fs.readFileSync(file, 'utf8')) as Place) : undefined;
}

/** Inside the data folder; or, where the cluster's user can't enter that, in a folder of that user's own. */
export function choosePlace(data: string, user: SystemUser | undefined): string {
  if (!user || runAs(user, '/usr/bin/test', ['-x', data]).status === 0) return path.join(data, 'pg');
  const parent = path.join(user.home, 'spinward');
  fs.mkdirSync(parent, { recursive: true, mode: 0o711 });
  return path.join(parent, randomUUID());
}

/** The port of the server that runs in the folder, by its pid file; undefined when that process isn't its server. */
export function runningServer(folder: string): number | undefined {
  const file = path.join(folder, 'postmaster.pid');
  if (!fs.existsSync(file)) return undefined;
  const [pid = '', , , port = ''] = fs.readFileSync(file, 'utf8').split('\n');
  const command = `/proc/${pid.trim()}/cmdline`;
  if (!fs.existsSync(command)) return undefined;
  const words = fs.readFileSync(command, 'utf8').split('\0');
  return /postgres$/.test(words[0] ?? '') && words.includes(folder) ? Number(port) : undefined;
}

import { randomBytes } from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';

/** Writes a file that only its owner may read, in one step, so that a killed run leaves the old one or the new. */
export function writePrivate(file: string, text: string): void {
  const next = `${file}.${process.pid}.new`;
  fs.writeFileSync(next, text, { mode: 0o600 });
  fs.renameSync(next, file);
}

/** The text of a file, or what `make` makes, which is then kept there. */
export function keptOr(file: string, make: () => string): string {
  if (!fs.existsSync(file)) writePrivate(file, make());
  return fs.readFileSync(file, 'utf8');
}

export const randomSecret = (): string => randomBytes(32).toString('base64url');

/** Makes the data folder; others may pass through it (the database's user has to) but not list it. */
export function openDataFolder(data: string): string {
  const folder = path.resolve(data);
  fs.mkdirSync(folder, { recursive: true, mode: 0o711 });
  return folder;
}

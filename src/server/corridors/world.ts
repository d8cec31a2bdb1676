import { readFile } from 'node:fs/promises';
import path from 'node:path';
import { promisify } from 'node:util';
import { gunzip } from 'node:zlib';
import { decodeLand, decodeSettlements, worldOf, type World } from '#core/downrange/index.ts';

/** Made by `npm run downrange`; the browser may have the same files. */
const FOLDER = 'public/downrange';

async function unpacked(name: string): Promise<Uint8Array> {
  return promisify(gunzip)(await readFile(path.resolve(FOLDER, name)));
}

async function read(): Promise<World> {
  const [land, settlements] = await Promise.all([unpacked('land.pbf.gz'), unpacked('settlements.pbf.gz')]);
  return worldOf(decodeLand(land), decodeSettlements(settlements));
}

let known: Promise<World> | undefined;

/** Land and settlements, read once a process or thread: some 60 MB. */
export function loadWorld(): Promise<World> {
  known ??= read().catch((error: unknown) => {
    // The next one who asks tries again.
    known = undefined;
    throw error;
  });
  return known;
}

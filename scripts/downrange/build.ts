/*
 * npm run downrange: prepares the land and the settlements that corridors are judged by, from open data in npm
 * packages (named with their licences in src/core/downrange/attributions.ts). Calls no service. Run it again when a
 * package moves, and commit what it writes.
 */
import { mkdirSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { gzipSync } from 'node:zlib';
import { encodeLand } from '#core/downrange/data/land-data.ts';
import { encodeSettlements } from '#core/downrange/data/settlement-data.ts';
import { worldLand } from './land.ts';
import { worldSettlements } from './settlements.ts';

const folder = fileURLToPath(new URL('../../public/downrange/', import.meta.url));
mkdirSync(folder, { recursive: true });

function write(name: string, bytes: Uint8Array): void {
  const packed = gzipSync(bytes, { level: 9 });
  writeFileSync(folder + name, packed);
  console.info(
    `${name}: ${(packed.length / 1e6).toFixed(2)} MB (${(bytes.length / 1e6).toFixed(2)} MB unpacked)`,
  );
}

const started = performance.now();
const settlements = worldSettlements();
const land = worldLand(settlements);
write('settlements.pbf.gz', encodeSettlements(settlements));
write('land.pbf.gz', encodeLand(land));
const seconds = ((performance.now() - started) / 1000).toFixed(1);
console.info(`${settlements.people.length} settlements, ${land.cells.size} cells with land, ${seconds} s`);
console.info(
  `no total of people: ${land.countries
    .filter(({ people }) => people === null)
    .map(({ code }) => code)
    .join(' ')}`,
);

/*
 * npm run bench: prints what each tests/bench/<topic>.bench.ts measures. A bench exports functions that answer with
 * the lines to print.
 */
import fs from 'node:fs';
import { fileURLToPath } from 'node:url';

type Bench = () => Promise<string[]>;

const folder = fileURLToPath(new URL('.', import.meta.url));
const wanted = process.argv[2] ?? '';
const files = fs.readdirSync(folder).filter((name) => name.endsWith('.bench.ts') && name.includes(wanted));
if (files.length === 0) throw new Error(`No bench is named ${wanted}.`);

for (const file of files.sort()) {
  const exported = (await import(new URL(file, import.meta.url).href)) as Record<string, unknown>;
  const benches = Object.values(exported).filter((value): value is Bench => typeof value === 'function');
  for (const bench of benches) console.log((await bench()).join('\n'));
}

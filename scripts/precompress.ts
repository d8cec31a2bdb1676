import fs from 'node:fs';
import path from 'node:path';
import { brotliCompressSync, constants } from 'node:zlib';

const TEXT = /\.(js|css|svg)$/;
const WORTH_IT_BYTES = 1_024;

/** Writes a brotli twin (`name.br`) beside every text file worth it, once, instead of at every request. */
export function precompress(folder: string): void {
  for (const name of fs.readdirSync(folder).filter((entry) => TEXT.test(entry))) {
    const file = path.join(folder, name);
    const raw = fs.readFileSync(file);
    if (raw.length < WORTH_IT_BYTES) continue;
    const params = {
      [constants.BROTLI_PARAM_QUALITY]: 10,
      [constants.BROTLI_PARAM_SIZE_HINT]: raw.length,
    };
    fs.writeFileSync(`${file}.br`, brotliCompressSync(raw, { params }));
  }
}

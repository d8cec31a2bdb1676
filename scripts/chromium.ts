import fs from 'node:fs';
import path from 'node:path';

/** Where a program lies on the PATH. */
export const programPath = (name: string): string | undefined =>
  (process.env['PATH'] ?? '')
    .split(path.delimiter)
    .map((folder) => path.join(folder, name))
    .find((file) => fs.existsSync(file));

/** Debian's Chromium, or the one that CHROMIUM names. */
export const chromiumPath = (): string | undefined => process.env['CHROMIUM'] || programPath('chromium');

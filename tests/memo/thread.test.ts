import { rmSync } from 'node:fs';
import path from 'node:path';
import { build } from 'esbuild';
import { Piscina } from 'piscina';
import { afterAll, expect, test } from 'vitest';
import { composeMemo } from '#server/memo/compose.ts';
import { renderMemo } from '#worker/memo/render.tsx';
import { inventedFacts } from './invented.ts';

// Inside the project, so that the bundle finds its packages from where it lies.
const folder = path.resolve('test-results', 'memo-thread');
afterAll(() => rmSync(folder, { recursive: true, force: true }));

test('a thread started anywhere renders the same bytes', async () => {
  await build({
    entryPoints: ['src/worker/memo-thread.ts'],
    outdir: folder,
    outExtension: { '.js': '.mjs' },
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    packages: 'external',
    jsx: 'automatic',
  });
  const pool = new Piscina({ filename: path.join(folder, 'memo-thread.mjs'), maxThreads: 1, minThreads: 0 });
  const model = composeMemo(inventedFacts({ sites: 4, orbits: 2 }));
  const bytes = (await pool.run(model)) as Uint8Array;
  await pool.destroy();
  expect(Buffer.compare(bytes, await renderMemo(model))).toBe(0);
}, 60_000);

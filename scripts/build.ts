import { createHash } from 'node:crypto';
import fs from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { build as bundle } from 'esbuild';
import { runNode } from './child.ts';
import { inLock } from './lock.mjs';
import { precompress } from './precompress.ts';

const ROOT = fileURLToPath(new URL('..', import.meta.url));
const STAMP = path.join(ROOT, 'dist', 'built-from');

/** Everything a build is made from. */
const SOURCES = [
  'src',
  'seed',
  'public',
  'scripts',
  'astro.config.ts',
  'package-lock.json',
  'package.json',
  'tsconfig.json',
];

function filesUnder(name: string): string[] {
  const file = path.join(ROOT, name);
  if (!fs.existsSync(file)) return [];
  if (!fs.statSync(file).isDirectory()) return [name];
  return fs
    .readdirSync(file)
    .sort()
    .flatMap((child) => filesUnder(path.join(name, child)));
}

function hashOfSources(): string {
  const hash = createHash('sha256').update(process.versions.node);
  for (const name of SOURCES.flatMap(filesUnder))
    hash.update(`\0${name}\0`).update(fs.readFileSync(path.join(ROOT, name)));
  return hash.digest('hex');
}

const entries = (folder: string): Record<string, string> =>
  Object.fromEntries(
    (fs.existsSync(path.join(ROOT, folder)) ? fs.readdirSync(path.join(ROOT, folder)) : [])
      .filter((name) => /\.tsx?$/.test(name))
      .map((name) => [`worker/${name.replace(/\.tsx?$/, '')}`, path.join(ROOT, folder, name)]),
  );

/**
 * Bundles what runs outside Astro: the workers and the server's front. Packages stay outside the bundles. In `astro
 * dev` the workers run from these files too, because a thread loads no TypeScript.
 */
export async function buildWorkers(): Promise<void> {
  await bundle({
    absWorkingDir: ROOT,
    entryPoints: {
      ...entries('src/worker'),
      web: path.join(ROOT, 'scripts/web.ts'),
      dev: path.join(ROOT, 'scripts/dev.ts'),
      worker: path.join(ROOT, 'scripts/worker.ts'),
    },
    outdir: 'dist',
    outExtension: { '.js': '.mjs' },
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    packages: 'external',
    sourcemap: true,
    jsx: 'automatic',
    logLevel: 'warning',
  });
}

function buildPages(): Promise<void> {
  const env = { NODE_ENV: 'production', ASTRO_TELEMETRY_DISABLED: '1' };
  return runNode(['node_modules/astro/astro.js', 'build', '--silent'], env, 'The build');
}

const isBuiltFrom = (sources: string): boolean =>
  fs.existsSync(STAMP) && fs.readFileSync(STAMP, 'utf8') === sources;

/** Bundles what a worker process needs, unless everything is built from these very sources already. */
export async function buildWorkersIfChanged(): Promise<void> {
  await inLock(`build:${ROOT}`, async () => {
    if (!isBuiltFrom(hashOfSources())) await buildWorkers();
  });
}

/** Builds what is served, unless it is built from these very sources already. */
export async function buildIfChanged(): Promise<void> {
  await inLock(`build:${ROOT}`, async () => {
    const wanted = hashOfSources();
    if (isBuiltFrom(wanted)) return;
    console.log('Building (about half a minute)…');
    fs.rmSync(STAMP, { force: true });
    await buildPages();
    await buildWorkers();
    precompress(path.join(ROOT, 'dist/client/_astro'));
    fs.writeFileSync(STAMP, wanted);
  });
}

if (process.argv[1] && path.resolve(process.argv[1]) === fileURLToPath(import.meta.url))
  buildIfChanged().catch((error: Error) => {
    console.error(error.message);
    process.exitCode = 1;
  });

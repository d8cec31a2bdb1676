// What every command needs before TypeScript can run: the right Node, and the packages of package-lock.json.
// Plain JavaScript, because nothing is installed yet when it runs.
import { spawnSync } from 'node:child_process';
import fs from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { inLock } from './lock.mjs';

export const ROOT = path.resolve(fileURLToPath(new URL('..', import.meta.url)));

/** Node versions that the pinned packages run on. @param {string} version such as 20.19.0 */
export function nodeIsFit(version) {
  const [major = 0, minor = 0] = version.split('.').map(Number);
  return (major === 20 && minor >= 19) || (major === 22 && minor >= 12) || major > 22;
}

/** @param {string} file @returns {Record<string, { version?: string; optional?: boolean; link?: boolean }>} */
const packagesIn = (file) => JSON.parse(fs.readFileSync(file, 'utf8')).packages;

/** Whether npm's own note of what it installed agrees with package-lock.json; npm writes that note last. */
function packagesAreInstalled() {
  const note = path.join(ROOT, 'node_modules', '.package-lock.json');
  if (!fs.existsSync(note)) return false;
  const installed = packagesIn(note);
  return Object.entries(packagesIn(path.join(ROOT, 'package-lock.json'))).every(
    ([name, wanted]) => name === '' || wanted.optional || installed[name]?.version === wanted.version,
  );
}

/** Leaves the packages as package-lock.json wants them; does nothing when they already are. */
async function installPackages() {
  await inLock(`install:${ROOT}`, async () => {
    if (packagesAreInstalled()) return;
    console.log('Installing the npm packages (npm ci, about a minute)…');
    const npm = spawnSync('npm', ['ci', '--ignore-scripts', '--no-audit', '--no-fund', '--loglevel=error'], {
      cwd: ROOT,
      // npm's own settings of an outer `npm start` must not change how the inner one installs
      env: { ...process.env, NODE_ENV: 'development', npm_config_omit: '' },
      stdio: 'inherit',
    });
    if (npm.status !== 0) fail('npm ci did not finish; its own message stands above. Nothing was started.');
  });
}

/** Ends the process with a sentence a person can act on. @param {string} message @returns {never} */
export function fail(message) {
  console.error(message);
  process.exit(1);
}

/** Checks Node, installs packages, and makes TypeScript files loadable by this process. */
export async function prepare() {
  process.chdir(ROOT);
  if (!nodeIsFit(process.versions.node))
    fail(`Spinward needs Node 20.19 or later (or 22.12 or later); this is ${process.versions.node}.`);
  await installPackages();
  const { register } = await import('tsx/esm/api');
  register();
}

import { spawn } from 'node:child_process';
import fs from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { chromiumPath, programPath } from './chromium.ts';
import { aptInstall } from './debian.ts';
import { serverPrograms } from './postgres.ts';
import { readPlaywright, readVitest, summarise, type Counts, type Outcome } from './test-summary.ts';

const ROOT = fileURLToPath(new URL('..', import.meta.url));

interface Step {
  name: string;
  /** Program of node_modules, and its arguments. */
  command: readonly [string, ...string[]];
  env?: Record<string, string>;
  counts?: () => Counts;
}

/** What the machine must have beside Node; each is installed from Debian where it is missing. */
function installPrograms(browser: boolean): void {
  serverPrograms();
  if (!programPath('pdftotext')) aptInstall(['poppler-utils'], 'The memo tests read PDFs with poppler-utils');
  if (browser && !programPath('curl')) aptInstall(['curl'], 'A test uploads with curl');
  if (browser && !chromiumPath())
    aptInstall(['chromium', 'fonts-liberation'], 'The browser tests drive Chromium');
}

function stepsOf(browser: boolean, reports: string): Step[] {
  const vitest = path.join(reports, 'vitest.json');
  const playwright = path.join(reports, 'playwright.json');
  const astro = 'astro/astro.js';
  const always: Step[] = [
    { name: 'formatting', command: ['prettier/bin/prettier.cjs', '--check', '--log-level=warn', '.'] },
    { name: 'lint', command: ['eslint/bin/eslint.js', '--max-warnings=0', '.'] },
    {
      name: 'types',
      command: [astro, 'check', '--minimumFailingSeverity', 'warning', '--minimumSeverity', 'warning'],
    },
    {
      name: 'unit, reference and database tests',
      command: [
        'vitest/vitest.mjs',
        'run',
        '--reporter=default',
        '--reporter=json',
        `--outputFile.json=${vitest}`,
      ],
      counts: () => readVitest(vitest),
    },
    { name: 'build', command: ['tsx/dist/cli.mjs', 'scripts/build.ts'] },
  ];
  const last: Step = {
    name: 'browser tests',
    command: ['@playwright/test/cli.js', 'test'],
    env: { E2E_REPORT: playwright },
    counts: () => readPlaywright(playwright),
  };
  return browser ? [...always, last] : always;
}

const run = ({ command: [program, ...args], env }: Step): Promise<number | null> =>
  new Promise((resolve) => {
    const child = spawn(process.execPath, [path.join(ROOT, 'node_modules', program), ...args], {
      cwd: ROOT,
      stdio: 'inherit',
      env: { ...process.env, ASTRO_TELEMETRY_DISABLED: '1', ...env },
    });
    child.once('exit', resolve);
  });

async function runStep(step: Step): Promise<Outcome> {
  console.log(`\n── ${step.name}`);
  const started = performance.now();
  const code = await run(step);
  const seconds = (performance.now() - started) / 1_000;
  const counts = step.counts?.();
  return { name: step.name, passed: code === 0 && !counts?.failed, seconds, ...(counts ? { counts } : {}) };
}

/** Runs every check, whether or not one before it failed, and ends the process with 1 when one did. */
export async function main(args: readonly string[]): Promise<void> {
  const browser = !args.includes('--no-browser');
  try {
    installPrograms(browser);
  } catch (error) {
    console.error((error as Error).message);
    process.exit(1);
  }
  const reports = fs.mkdtempSync(path.join(os.tmpdir(), 'spinward-reports-'));
  const outcomes: Outcome[] = [];
  for (const step of stepsOf(browser, reports)) outcomes.push(await runStep(step));
  fs.rmSync(reports, { recursive: true });
  console.log(summarise(outcomes));
  process.exitCode = outcomes.every((outcome) => outcome.passed) ? 0 : 1;
}

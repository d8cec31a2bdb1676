import { fileURLToPath } from 'node:url';
import { chromium } from '@playwright/test';
import { build } from 'esbuild';
import { chromiumPath } from '#scripts/chromium.ts';
import { CRITERIA, SITES } from './invented-study.ts';

const FRAMES = 240;
const FRAME_MS = 16;

/** Core and the bench as one script that a page can run. */
async function bundled(): Promise<string> {
  const { outputFiles } = await build({
    entryPoints: [fileURLToPath(new URL('re-ranking-page.ts', import.meta.url))],
    bundle: true,
    write: false,
    minify: true,
    format: 'iife',
    globalName: 'bench',
    target: 'es2022',
  });
  return outputFiles.map(({ text }) => text).join('\n');
}

/** Times the re-ranking of a large study in a browser while a weight is dragged; the goal is one frame. */
export async function benchBrowser(): Promise<string[]> {
  const executablePath = chromiumPath();
  const browser = await chromium.launch({
    ...(executablePath ? { executablePath } : {}),
    args: ['--no-sandbox', '--no-first-run', '--disable-background-networking'],
  });
  try {
    const page = await browser.newPage();
    await page.addScriptTag({ content: await bundled() });
    const [first = NaN, ...moves] = await page.evaluate<number[]>(`bench.drag(${FRAMES})`);
    const times = moves.sort((a, b) => a - b);
    const median = times[FRAMES / 2] ?? NaN;
    const worst = times.at(-1) ?? NaN;
    const late = times.filter((ms) => ms >= FRAME_MS).length;
    return [
      `browser: ${SITES} sites × ${CRITERIA} criteria re-ranked in ${median.toFixed(1)} ms (median), ${worst.toFixed(1)} ms (worst of ${FRAMES} frames), ${late} at ${FRAME_MS} ms or above; first ranking of the page ${first.toFixed(1)} ms; Chromium ${browser.version()}`,
    ];
  } finally {
    await browser.close();
  }
}

// `npm run worker`: a process that flies ascents for the studies of DATABASE_URL, beside the server's own share of
// them, on this machine or any other. It checks Node and the packages like `npm start`, bundles what has changed and
// hands over to dist/worker.mjs (scripts/worker.ts). Plain JavaScript, because it runs before anything is installed.
import { prepare } from './bootstrap.mjs';

await prepare();
const { buildWorkersIfChanged } = await import('./build.ts');
await buildWorkersIfChanged();
await import(new URL('../dist/worker.mjs', import.meta.url).href);

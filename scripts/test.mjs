// `npm test` and `npm run validate`. In this order: checks the Node version; installs the npm packages when they are
// missing or package-lock.json has changed; then hands over to scripts/test.ts, which installs what else the tests
// need from Debian (PostgreSQL, Chromium, poppler-utils), runs every check and closes with a summary.
// Plain JavaScript, because it runs before anything is installed.
import { prepare } from './bootstrap.mjs';

await prepare();
const { main } = await import('./test.ts');
await main(process.argv.slice(2));

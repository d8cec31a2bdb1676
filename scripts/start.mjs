// `npm start`, `npm run dev` and `npm run admin`. In this order: checks the Node version; installs the npm packages
// when they are missing or package-lock.json has changed; then hands over to scripts/serve.ts, which finds or
// installs PostgreSQL, starts the private cluster under .data/, migrates, seeds the demo into an empty one, builds
// what has changed and serves. Plain JavaScript, because it runs before anything is installed.
import { prepare } from './bootstrap.mjs';

await prepare();
const { main } = await import('./serve.ts');
await main(process.argv.slice(2));

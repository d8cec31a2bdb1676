import { parseArgs } from 'node:util';
import { openDatabase } from '#db/client.ts';
import { env } from '#server/env.ts';
import { scenario } from './demo/scenario.ts';
import { loadLibrary } from './load-library.ts';
import { loadDemo } from './load.ts';

// `npm run seed` loads the demo into an empty database; `npm run seed -- --library-only` the two library vehicles.
const { values } = parseArgs({ options: { 'library-only': { type: 'boolean', default: false } } });
const db = openDatabase(env().DATABASE_URL, 1);
try {
  if (values['library-only']) await loadLibrary(db);
  else if (!(await loadDemo(db, scenario)))
    console.log('The database has people already: nothing was loaded.');
} finally {
  await db.$client.end();
}

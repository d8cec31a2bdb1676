import { database } from '#server/database.ts';

export interface Health {
  status: 'ok' | 'unavailable';
  database: 'up' | 'away';
}

const PATIENCE_MS = 2_000;

/** Asks the database for a sign of life, for at most two seconds. */
export async function checkHealth(): Promise<Health> {
  let timer: NodeJS.Timeout | undefined;
  const late = new Promise<never>((_, reject) => {
    timer = setTimeout(() => reject(new Error('The database is silent.')), PATIENCE_MS);
  });
  try {
    await Promise.race([database().$client.query('select 1'), late]);
    return { status: 'ok', database: 'up' };
  } catch {
    return { status: 'unavailable', database: 'away' };
  } finally {
    clearTimeout(timer);
  }
}

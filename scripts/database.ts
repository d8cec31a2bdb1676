import path from 'node:path';
import { like, sql } from 'drizzle-orm';
import { openDatabase } from '#db/client.ts';
import { user } from '#db/schema/auth.ts';
import type { StartEnv } from '#server/env.ts';
import { APP_ROLE, Cluster, OWNER_ROLE } from './cluster.ts';
import { DEMO_DOMAIN, type Contents } from './demo.ts';
import { keptOr, openDataFolder, randomSecret } from './private-files.ts';

const DATABASE = 'spinward';

/** Where the app's data is, and how to let go of it. */
export interface Connections {
  appUrl: string;
  ownerUrl: string;
  close: () => Promise<void>;
}

/** The database of the settings, or the private cluster's. */
export async function openConnections(settings: StartEnv): Promise<Connections> {
  if (settings.DATABASE_URL) {
    if (!settings.DATABASE_MIGRATE_URL)
      console.warn(
        'DATABASE_MIGRATE_URL is not set: migrating as the role of DATABASE_URL, which may then define things.',
      );
    const appUrl = settings.DATABASE_URL;
    return { appUrl, ownerUrl: settings.DATABASE_MIGRATE_URL ?? appUrl, close: async () => undefined };
  }
  const cluster = await Cluster.open({ data: settings.SPINWARD_DATA });
  await cluster.makeDatabase(DATABASE);
  const close = (): Promise<void> => cluster.stop();
  return { appUrl: cluster.url(APP_ROLE, DATABASE), ownerUrl: cluster.url(OWNER_ROLE, DATABASE), close };
}

/** The secret of the settings, or the one kept in the data folder. */
export function sessionSecret(settings: StartEnv): string {
  if (settings.BETTER_AUTH_SECRET) return settings.BETTER_AUTH_SECRET;
  return keptOr(path.join(openDataFolder(settings.SPINWARD_DATA), 'session-secret'), randomSecret);
}

/** Runs `work` with a database of the app's role, and closes it. */
export async function withDatabase<T>(
  url: string,
  work: (db: ReturnType<typeof openDatabase>) => Promise<T>,
): Promise<T> {
  const db = openDatabase(url, 2);
  try {
    return await work(db);
  } finally {
    await db.$client.end();
  }
}

export function readContents(appUrl: string): Promise<Contents> {
  return withDatabase(appUrl, async (db) => {
    const people = await db
      .select({ one: sql`1` })
      .from(user)
      .limit(1);
    const demo = await db
      .select({ one: sql`1` })
      .from(user)
      .where(like(user.email, `%@${DEMO_DOMAIN}`))
      .limit(1);
    return { isEmpty: people.length === 0, hasDemo: demo.length > 0 };
  });
}

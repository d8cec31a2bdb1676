import type { Db } from '#db/client.ts';
import { listSessions } from '#db/queries/person.ts';
import type { SignedIn } from '#server/auth/actor.ts';

/** One of a person's sessions, as the account page shows it. */
export interface SessionView {
  here: boolean;
  /** The browser's own words for itself, shortened to its name and system. */
  browser: string;
  address: string;
  /** ISO 8601, UTC. */
  since: string;
  lastSeenAt: string;
}

const BROWSERS = ['Edg', 'OPR', 'Firefox', 'Chrome', 'Safari'] as const;
const SYSTEMS = ['Windows', 'Android', 'iPhone', 'iPad', 'Mac OS X', 'Linux'] as const;
const NAMES: Record<string, string> = { Edg: 'Edge', OPR: 'Opera', 'Mac OS X': 'macOS' };

/** "Firefox on Linux" out of a user agent; the first of each list that it names, because they name each other. */
export function browserOf(userAgent: string | null): string {
  const first = (names: readonly string[]): string | undefined => {
    const found = names.find((name) => userAgent?.includes(name));
    return found && (NAMES[found] ?? found);
  };
  const browser = first(BROWSERS) ?? 'A program';
  const system = first(SYSTEMS);
  return system ? `${browser} on ${system}` : browser;
}

export async function readSessions(db: Db, { userId, sessionToken }: SignedIn): Promise<SessionView[]> {
  const rows = await listSessions(db, { userId });
  return rows.map((row) => ({
    here: row.token === sessionToken,
    browser: browserOf(row.userAgent),
    address: row.ipAddress ?? '',
    since: row.createdAt.toISOString(),
    lastSeenAt: row.updatedAt.toISOString(),
  }));
}

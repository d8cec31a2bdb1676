import { EventEmitter } from 'node:events';
import pg from 'pg';
import { z } from 'zod';
import { env } from '#server/env.ts';
import { onStop } from '#server/lifecycle.ts';

const CHANNEL = 'spinward_record';
const RETRY_MS = 500;

/** What migration 0001 announces: the newest record line of a statement, and which kinds of object it names. */
const Announcement = z.object({
  id: z.number(),
  studyId: z.string(),
  revision: z.number().nullable(),
  userId: z.string().nullable(),
  objects: z.array(z.string()),
});
export type Announcement = z.infer<typeof Announcement>;

const bus = new EventEmitter().setMaxListeners(0);
let connected = false;
let stopped = false;

function again(): void {
  connected = false;
  if (!stopped) setTimeout(() => void listen(), RETRY_MS).unref();
}

/** One LISTEN connection for the whole process; it comes back when the database does, and says so. */
async function listen(): Promise<void> {
  if (connected || stopped) return;
  connected = true;
  const client = new pg.Client({ connectionString: env().DATABASE_URL, keepAlive: true });
  client.on('notification', ({ payload }) => {
    const parsed = Announcement.safeParse(JSON.parse(payload ?? 'null'));
    if (parsed.success) bus.emit('announcement', parsed.data);
  });
  client.once('error', () => void client.end().then(again, again));
  try {
    await client.connect();
    await client.query(`LISTEN ${CHANNEL}`);
    // Whatever happened while nobody listened is made good by reading everything again.
    bus.emit('gap');
    onStop(() => {
      stopped = true;
      return client.end();
    });
  } catch {
    client.removeAllListeners('error').on('error', () => undefined);
    again();
  }
}

/** Calls back for every announcement, and for a gap in them. Returns how to stop. */
export function subscribe(onAnnouncement: (a: Announcement) => void, onGap: () => void): () => void {
  void listen();
  bus.on('announcement', onAnnouncement);
  bus.on('gap', onGap);
  return () => {
    bus.off('announcement', onAnnouncement);
    bus.off('gap', onGap);
  };
}

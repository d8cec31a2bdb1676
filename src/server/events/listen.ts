import { EventEmitter } from 'node:events';
import pg from 'pg';
import { z } from 'zod';
import { env } from '#server/env.ts';
import { Coalescer } from '#server/events/coalesce.ts';
import { onStop } from '#server/lifecycle.ts';

const CHANNEL = 'spinward_record';
/** Progress of computing that changes no study: nothing of it is in the record. */
export const PROGRESS_CHANNEL = 'spinward_progress';
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

/** A study whose ascents moved on. */
export const Progress = z.object({ studyId: z.string() });
export type Progress = z.infer<typeof Progress>;

/** However many workers fly, a screen hears of a study this often at most. */
const PROGRESS_MS = 500;

const bus = new EventEmitter().setMaxListeners(0);
const progress = new Coalescer(PROGRESS_MS, (studyIds) => {
  for (const studyId of studyIds) bus.emit('progress', studyId);
});
let connected = false;
let stopped = false;

function again(): void {
  connected = false;
  if (!stopped) setTimeout(() => void listen(), RETRY_MS).unref();
}

function hear(channel: string, payload: unknown): void {
  if (channel === PROGRESS_CHANNEL) {
    const heard = Progress.safeParse(payload);
    if (heard.success) progress.add(heard.data.studyId);
    return;
  }
  const parsed = Announcement.safeParse(payload);
  if (parsed.success) bus.emit('announcement', parsed.data);
}

/** One LISTEN connection for the whole process; it comes back when the database does, and says so. */
async function listen(): Promise<void> {
  if (connected || stopped) return;
  connected = true;
  const client = new pg.Client({ connectionString: env().DATABASE_URL, keepAlive: true });
  client.on('notification', ({ channel, payload }) => hear(channel, JSON.parse(payload ?? 'null')));
  client.once('error', () => void client.end().then(again, again));
  try {
    await client.connect();
    await client.query(`LISTEN ${CHANNEL}; LISTEN ${PROGRESS_CHANNEL}`);
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

interface Listener {
  onAnnouncement: (a: Announcement) => void;
  /** Announcements may have been missed. */
  onGap: () => void;
  /** A study's ascents moved on. */
  onProgress: (studyId: string) => void;
}

/** Calls back for all that is announced. Returns how to stop. */
export function subscribe({ onAnnouncement, onGap, onProgress }: Listener): () => void {
  void listen();
  bus.on('announcement', onAnnouncement);
  bus.on('gap', onGap);
  bus.on('progress', onProgress);
  return () => {
    bus.off('announcement', onAnnouncement);
    bus.off('gap', onGap);
    bus.off('progress', onProgress);
  };
}

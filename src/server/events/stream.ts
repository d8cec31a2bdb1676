import type { Db } from '#db/client.ts';
import { findMembership } from '#db/queries/membership.ts';
import { listChangesSince } from '#db/queries/record.ts';
import { subscribe, type Announcement } from '#server/events/listen.ts';

const BEAT_MS = 15_000;

interface StreamOptions {
  db: Db;
  userId: string;
  /** One study alone, or null for every study the person is a member of. */
  studyId: string | null;
  signal: AbortSignal;
  /** `Last-Event-ID` of a stream that broke: what happened since is told first. */
  lastEventId: string | null;
}

/** Asked at every announcement, not once: whoever left a study hears no more of it. */
async function mayHear({ db, userId, studyId }: StreamOptions, of: string): Promise<boolean> {
  if (studyId && studyId !== of) return false;
  return (await findMembership(db, { studyId: of, userId })) !== undefined;
}

const change = (a: Announcement): string => `id: ${a.id}\nevent: change\ndata: ${JSON.stringify(a)}\n\n`;
/** No id: it is no line of the record, and nothing to resume from. */
const progress = (studyId: string): string =>
  `event: progress\ndata: ${JSON.stringify({ studyId, objects: ['ascent'] })}\n\n`;
const GAP = 'event: gap\ndata: {}\n\n';

/** What a broken stream missed, a line a study; a gap where the number is no number of ours. */
async function missed({ db, userId, studyId, lastEventId }: StreamOptions): Promise<string> {
  if (lastEventId === null) return '';
  if (!/^\d{1,15}$/.test(lastEventId)) return GAP;
  const since = await listChangesSince(db, { userId, studyId, recordId: Number(lastEventId) });
  return since.map(change).join('');
}

/**
 * Server-sent events of the changes a person may see. `change` carries `{ studyId, revision, userId, objects }` and
 * the record's number as its id; `progress`, two a second at most, that a study's ascents moved on; `gap` that changes
 * may have been missed, so that the reader reads again.
 */
export function eventStream(options: StreamOptions): Response {
  const encode = new TextEncoder();
  let close = (): void => undefined;
  const stream = new ReadableStream<Uint8Array>({
    start(controller) {
      const send = (text: string): void => {
        try {
          controller.enqueue(encode.encode(text));
        } catch {
          close();
        }
      };
      const tell = (studyId: string, text: string): void =>
        void mayHear(options, studyId).then(
          (hears) => {
            if (hears) send(text);
          },
          () => send(GAP),
        );
      const off = subscribe({
        onAnnouncement: (a) => tell(a.studyId, change(a)),
        onProgress: (studyId) => tell(studyId, progress(studyId)),
        onGap: () => send(GAP),
      });
      const beat = setInterval(() => send(': beat\n\n'), BEAT_MS);
      close = () => {
        off();
        clearInterval(beat);
        try {
          controller.close();
        } catch {
          // already closed by the reader
        }
      };
      send('retry: 1000\n\n');
      void missed(options).then(send, () => send(GAP));
      options.signal.addEventListener('abort', close);
    },
    cancel() {
      close();
    },
  });
  return new Response(stream, {
    headers: {
      'content-type': 'text/event-stream',
      'cache-control': 'no-store',
      'x-accel-buffering': 'no',
    },
  });
}

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
async function mayHear({ db, userId, studyId }: StreamOptions, a: Announcement): Promise<boolean> {
  if (studyId && studyId !== a.studyId) return false;
  return (await findMembership(db, { studyId: a.studyId, userId })) !== undefined;
}

const change = (a: Announcement): string => `id: ${a.id}\nevent: change\ndata: ${JSON.stringify(a)}\n\n`;
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
 * the record's number as its id; `gap` says that changes may have been missed, so that the reader reads again.
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
      const off = subscribe(
        (a) =>
          void mayHear(options, a).then(
            (hears) => {
              if (hears) send(change(a));
            },
            () => send(GAP),
          ),
        () => send(GAP),
      );
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

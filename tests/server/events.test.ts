import { eq } from 'drizzle-orm';
import { afterAll, expect, test } from 'vitest';
import { study } from '#db/schema/study.ts';
import { changeStudy } from '#server/change-study.ts';
import { eventStream } from '#server/events/stream.ts';
import { stopAll } from '#server/lifecycle.ts';
import type { Member } from '#server/member.ts';
import { testDatabase } from '#tests/support/database.ts';
import { joined, studyWith } from '#tests/support/study.ts';

const { db } = await testDatabase();
afterAll(stopAll);

const change = (member: Member, title: string) =>
  changeStudy(db, { member, kind: 'inputs' }, async (tx, row) => {
    await tx.update(study).set({ title }).where(eq(study.id, row.id));
    return { result: {}, entries: [{ object: 'study', objectId: row.id, action: 'rename', to: title }] };
  });

interface Reading {
  text: () => string;
  until: (wanted: string) => Promise<void>;
  stop: () => void;
}

function read(userId: string, lastEventId: string | null = null): Reading {
  const abort = new AbortController();
  const { body } = eventStream({ db, userId, studyId: null, signal: abort.signal, lastEventId });
  let text = '';
  const decoder = new TextDecoder();
  const reading = (async () => {
    for await (const chunk of body ?? []) text += decoder.decode(chunk);
  })();
  reading.catch(() => undefined);
  return {
    text: () => text,
    until: async (wanted) => {
      for (let i = 0; i < 200 && !text.includes(wanted); i++) await new Promise((r) => setTimeout(r, 20));
      expect(text).toContain(wanted);
    },
    stop: () => abort.abort(),
  };
}

test('a member hears of a change, a stranger does not', async () => {
  const lead = await studyWith(db, 'lead');
  const reader = await joined(db, { studyId: lead.studyId, role: 'reader' });
  const stranger = await studyWith(db, 'lead');
  const [heard, overheard] = [read(reader.userId), read(stranger.userId)];
  // Listening has begun when the first gap is told.
  await Promise.all([heard.until('event: gap'), overheard.until('event: gap')]);
  await change(lead, 'Second');
  await heard.until(`"studyId":"${lead.studyId}"`);
  await change(stranger, 'Own');
  await overheard.until(`"studyId":"${stranger.studyId}"`);
  expect(overheard.text()).not.toContain(lead.studyId);
  heard.stop();
  overheard.stop();
});

test('a broken stream is told what it missed, once a study', async () => {
  const lead = await studyWith(db, 'lead');
  const first = read(lead.userId);
  await change(lead, 'Second');
  await first.until('event: change');
  const lastEventId = /^id: (\d+)$/m.exec(first.text())?.[1] ?? '';
  await change(lead, 'Third');
  await change(lead, 'Fourth');
  // Both are past when the second stream opens, so it can only have them from the record.
  await first.until('"revision":4');
  first.stop();
  const second = read(lead.userId, lastEventId);
  await second.until('"revision":4');
  expect(second.text().match(/event: change/g)).toHaveLength(1);
  second.stop();
});

test('a number that is none of ours is answered with a gap', async () => {
  const lead = await studyWith(db, 'lead');
  const reading = read(lead.userId, 'yesterday');
  await reading.until('event: gap');
  reading.stop();
});

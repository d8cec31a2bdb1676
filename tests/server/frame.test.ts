import { expect, test } from 'vitest';
import type { StudyInput } from '#contract/study.ts';
import { findMembership } from '#db/queries/membership.ts';
import { study } from '#db/schema/study.ts';
import { site } from '#db/schema/site.ts';
import { changeStudy } from '#server/change-study.ts';
import { createStudy } from '#server/studies/create-study.ts';
import { loadFrame } from '#server/studies/frame.ts';
import { eq } from 'drizzle-orm';
import { testDatabase } from '#tests/support/database.ts';
import { person } from '#tests/support/study.ts';

const { db } = await testDatabase();

/** What the middleware leaves for a page of the study. */
async function localsOf(
  from: StudyInput['from'],
): Promise<App.Locals & { member: NonNullable<App.Locals['member']> }> {
  const who = await person(db, 'Ada Quill');
  const email = `${who.userId}@spinward.test`;
  const made = await createStudy(db, { maker: { ...who, email }, input: { title: 'Trial', from } });
  const found = await findMembership(db, { studyId: made.id, userId: who.userId });
  if (!found) throw new Error('no membership');
  return {
    db,
    requestId: '',
    nonce: '',
    user: { ...who, email, administrator: false, sessionToken: null },
    member: { ...who, memberId: found.id, studyId: made.id, role: found.role },
  };
}
const factsOf = async (locals: App.Locals) =>
  Object.fromEntries(
    (await loadFrame(locals)).sections.map(({ key, fact, outstanding }) => [key, { fact, outstanding }]),
  );

test('a blank study says what is to be done', async () => {
  const locals = await localsOf('blank');
  const frame = await loadFrame(locals);
  expect(frame).toMatchObject({
    study: { title: 'Trial', state: 'draft', revision: 1, role: 'lead', archived: false },
    viewer: { name: 'Ada Quill', initials: 'AQ', administrator: false },
  });
  expect(frame.sections.every(({ href, key }) => href === `/studies/${locals.member.studyId}/${key}`)).toBe(
    true,
  );
  expect(await factsOf(locals)).toEqual({
    requirement: { fact: 'to be written', outstanding: true },
    sites: { fact: 'none yet', outstanding: true },
    flight: { fact: 'no results yet', outstanding: true },
    downrange: { fact: 'no sites yet', outstanding: true },
    criteria: { fact: 'none yet', outstanding: true },
    ranking: { fact: 'nothing to rank', outstanding: true },
    memo: { fact: 'draft', outstanding: false },
  });
});

test('the example says what there is, and the ranking follows the study’s changes', async () => {
  const locals = await localsOf('example');
  const facts = await factsOf(locals);
  expect(facts).toMatchObject({
    requirement: { fact: '5 orbits, Rowan M', outstanding: false },
    sites: { fact: '12 candidates' },
    flight: { fact: '60 results' },
    downrange: { fact: 'corridors: screening', outstanding: false },
    criteria: { fact: '7, weights set', outstanding: false },
    ranking: { fact: '1 incomplete', outstanding: true },
  });
  const { member } = locals;
  await changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    await tx.update(site).set({ deletedAt: new Date() }).where(eq(site.studyId, member.studyId));
    return { result: {}, entries: [{ object: 'site', objectId: member.studyId, action: 'remove' }] };
  });
  expect(await factsOf(locals)).toMatchObject({
    sites: { fact: 'none yet' },
    ranking: { fact: 'nothing to rank', outstanding: true },
  });
});

test('a study that went away meanwhile is not found', async () => {
  const locals = await localsOf('blank');
  const other = { ...locals, member: { ...locals.member, studyId: '00000000-0000-7000-8000-000000000000' } };
  await expect(loadFrame(other)).rejects.toMatchObject({ code: 'not-found' });
  expect(await db.select({ id: study.id }).from(study)).not.toHaveLength(0);
});

import { eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { WeightsChoice, type WeightsDraft } from '#contract/weights.ts';
import { member, study } from '#db/schema/study.ts';
import type { Member } from '#server/member.ts';
import { chooseWeights } from '#server/weights/choose-weights.ts';
import { readMemberWeights } from '#server/weights/member-weights.ts';
import { readWeights } from '#server/weights/read-weights.ts';
import { saveWeights } from '#server/weights/save-weights.ts';
import { testDatabase } from '#tests/support/database.ts';
import { joined, studyWith } from '#tests/support/study.ts';
import { criteriaOf, groupOf, intoGroup } from '#tests/support/weights.ts';

const { db } = await testDatabase();

/** A team of three, with Cost and Time grouped beside Access. */
async function team() {
  const lead = await studyWith(db, 'lead');
  const engineer = await joined(db, { studyId: lead.studyId, role: 'engineer', name: 'Bram Oduya' });
  const reviewer = await joined(db, { studyId: lead.studyId, role: 'reviewer', name: 'Cleo Marsh' });
  const [cost, time, access] = await criteriaOf(db, lead, 3);
  const group = await groupOf(db, lead, 'Business');
  await intoGroup(db, group, [cost, time]);
  return { lead, engineer, reviewer, cost, time, access, group };
}
type Team = Awaited<ReturnType<typeof team>>;

const own = (who: Member, input: WeightsDraft, version = 0) =>
  saveWeights(db, { member: who, weights: 'mine', version, input });
const choose = (who: Member, from: WeightsChoice['from'], version = 0, reason = 'The team’s own view.') =>
  chooseWeights(db, { member: who, version, choice: { from, reason } });
const seenBy = async ({ studyId, userId }: Member) =>
  (await readMemberWeights(db, { studyId, userId })).items;

/** Points of the lead: 0.3, 0.3, 0.4. Order of the engineer: group, access; time, cost. */
async function shareTwo({ lead, engineer, group, cost, time, access }: Team) {
  const points = { [group]: 60, [access]: 40, [cost]: 50, [time]: 50 };
  await own(lead, { points, shared: true });
  await own(engineer, { method: 'centroid', order: [group, access, time, cost], shared: true });
}

describe('members’ sets', () => {
  test('are seen when shared, one’s own always; readers keep none and see what is shared', async () => {
    const all = await team();
    await shareTwo(all);
    await own(all.reviewer, { points: { [all.access]: 1 } });
    const reader = await joined(db, { studyId: all.lead.studyId, role: 'reader', name: 'Dee Finch' });
    const states = (await seenBy(reader)).map(({ name, state, set }) => [name, state, set !== null]);
    expect(states).toEqual([
      ['Ada Quill', 'shared', true],
      ['Bram Oduya', 'shared', true],
      ['Cleo Marsh', 'kept', false],
    ]);
    const [, , cleo] = await seenBy(all.reviewer);
    expect(cleo).toMatchObject({ mine: true, state: 'kept', set: { shares: { [all.access]: 1 } } });
  });

  test('a set that is no longer shared is seen no more', async () => {
    const all = await team();
    await shareTwo(all);
    const points = { [all.group]: 60, [all.access]: 40, [all.cost]: 50, [all.time]: 50 };
    await own(all.lead, { points, shared: false }, 1);
    const [lead] = await seenBy(all.engineer);
    expect(lead).toMatchObject({ state: 'kept', set: null });
  });
});

describe('the lead’s choice', () => {
  test('takes a member’s set as it was said, with who and why, and moves the revision', async () => {
    const all = await team();
    await shareTwo(all);
    const chosen = await choose(all.lead, { kind: 'member', userId: all.engineer.userId });
    expect(chosen).toMatchObject({
      method: 'centroid',
      order: [all.group, all.access, all.time, all.cost],
      origin: { kind: 'member', userId: all.engineer.userId, name: 'Bram Oduya' },
      reason: 'The team’s own view.',
      version: 1,
      // 1 at the start, one more for each of three criteria and for the choice.
      revision: 5,
    });
  });

  test('takes the mean of all shared sets, as points that keep the groups', async () => {
    const all = await team();
    await shareTwo(all);
    await own(all.reviewer, { points: { [all.access]: 100 } });
    const { origin, shares, points, method } = await choose(all.lead, { kind: 'mean' });
    expect(origin).toMatchObject({ kind: 'mean', members: [{ name: 'Ada Quill' }, { name: 'Bram Oduya' }] });
    expect(method).toBe('points');
    // By hand: order gives the group 0.75 of 1, and within it time 0.75, cost 0.25.
    expect(shares?.[all.cost]).toBeCloseTo((0.3 + 0.75 * 0.25) / 2, 12);
    expect(shares?.[all.time]).toBeCloseTo((0.3 + 0.75 * 0.75) / 2, 12);
    expect(shares?.[all.access]).toBeCloseTo((0.4 + 0.25) / 2, 12);
    expect(points[all.group]).toBeCloseTo(67.5, 9);
  });

  test('is a lead’s, stands on the newest version, and is locked in review', async () => {
    const all = await team();
    await shareTwo(all);
    await expect(choose(all.engineer, { kind: 'mean' })).rejects.toMatchObject({ code: 'forbidden' });
    await expect(choose(all.lead, { kind: 'mean' }, 4)).rejects.toMatchObject({
      code: 'stale',
      current: { version: 0 },
    });
    await db.update(study).set({ state: 'in-review' }).where(eq(study.id, all.lead.studyId));
    await expect(choose(all.lead, { kind: 'mean' })).rejects.toMatchObject({ code: 'study-locked' });
  });

  test('cannot take a set that is not shared, is of a former member, or is not there', async () => {
    const all = await team();
    const nobody = { code: 'invalid', errors: [{ path: 'from.kind' }] };
    await expect(choose(all.lead, { kind: 'mean' })).rejects.toMatchObject(nobody);
    await own(all.reviewer, { points: { [all.access]: 1 } });
    const cleo = { kind: 'member', userId: all.reviewer.userId } as const;
    const refused = { code: 'invalid', errors: [{ path: 'from.userId' }] };
    await expect(choose(all.lead, cleo)).rejects.toMatchObject(refused);
    await own(all.reviewer, { points: { [all.access]: 1 }, shared: true }, 1);
    await db.delete(member).where(eq(member.id, all.reviewer.memberId));
    await expect(choose(all.lead, cleo)).rejects.toMatchObject(refused);
  });

  test('wants a reason', () => {
    const { success, error } = WeightsChoice.safeParse({ from: { kind: 'mean' }, reason: '  ' });
    expect(success).toBe(false);
    expect(error?.issues[0]?.message).toBe('Write the reason for the choice.');
  });

  test('falls away with its reason when the set is written by hand', async () => {
    const all = await team();
    await shareTwo(all);
    const { points } = await choose(all.lead, { kind: 'mean' });
    const study = (input: WeightsDraft, version: number) =>
      saveWeights(db, { member: all.lead, weights: 'study', version, input });
    // The same points again are no new set.
    expect(await study({ points }, 1)).toMatchObject({ origin: { kind: 'mean' }, version: 1 });
    expect(await study({ points: { ...points, [all.access]: 1 } }, 1)).toMatchObject({
      origin: { kind: 'apart' },
      reason: '',
    });
    await choose(all.lead, { kind: 'mean' }, 2);
    const apart = await study({ points: { ...points, [all.access]: 2 }, reason: 'Access is settled.' }, 3);
    expect(apart).toMatchObject({ origin: { kind: 'apart' }, reason: 'Access is settled.' });
    const { studyId, userId } = all.reviewer;
    expect(await readWeights(db, { studyId, userId, weights: 'study' })).toMatchObject({
      reason: 'Access is settled.',
    });
  });
});

import { asc, eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import type { WeightsDraft } from '#contract/weights.ts';
import { newId } from '#db/columns.ts';
import { record } from '#db/schema/record.ts';
import { study } from '#db/schema/study.ts';
import { loadRanking } from '#server/ranking/read-ranking.ts';
import { readWeights } from '#server/weights/read-weights.ts';
import { saveWeights } from '#server/weights/save-weights.ts';
import type { Member } from '#server/member.ts';
import { testDatabase } from '#tests/support/database.ts';
import { joined, studyWith } from '#tests/support/study.ts';
import { criteriaOf, groupOf, intoGroup } from '#tests/support/weights.ts';

const { db } = await testDatabase();

type Whose = 'study' | 'mine';
const read = ({ studyId, userId }: Member, weights: Whose) => readWeights(db, { studyId, userId, weights });
const state = (member: Member, weights: Whose, version: number, input: WeightsDraft) =>
  saveWeights(db, { member, weights, version, input });
const save = (member: Member, weights: Whose, version: number, points: Record<string, number>) =>
  state(member, weights, version, { points });
const revisionOf = async ({ studyId }: Member) => {
  const [row] = await db.select({ revision: study.revision }).from(study).where(eq(study.id, studyId));
  return row?.revision;
};
const lastLine = async ({ studyId }: Member) =>
  (await db.select().from(record).where(eq(record.studyId, studyId)).orderBy(asc(record.id))).at(-1);

describe('the study’s set', () => {
  test('starts unset, is normalised, moves the revision and is recorded', async () => {
    const lead = await studyWith(db, 'lead');
    const [a, b] = await criteriaOf(db, lead, 2);
    expect(await read(lead, 'study')).toEqual({
      weights: 'study',
      method: 'points',
      points: {},
      order: [],
      judgements: [],
      shares: null,
      levels: [{ groupId: null, ids: [a, b], weights: null, unjudged: [a, b], consistency: null }],
      shared: false,
      origin: null,
      reason: '',
      version: 0,
    });
    const before = await revisionOf(lead);
    const saved = await save(lead, 'study', 0, { [a]: 30, [b]: 10 });
    expect(saved).toMatchObject({
      version: 1,
      shares: { [a]: 0.75, [b]: 0.25 },
      levels: [{ weights: { [a]: 0.75, [b]: 0.25 }, unjudged: [] }],
      origin: { kind: 'apart' },
      revision: (before ?? 0) + 1,
    });
    expect(await lastLine(lead)).toMatchObject({
      object: 'weights',
      from: { points: {} },
      to: { points: { [a]: 30, [b]: 10 } },
    });
  });

  test('is a lead’s alone to write', async () => {
    const lead = await studyWith(db, 'lead');
    const [a] = await criteriaOf(db, lead, 2);
    for (const role of ['engineer', 'reviewer'] as const) {
      const member = await joined(db, { studyId: lead.studyId, role });
      await expect(save(member, 'study', 0, { [a]: 1 })).rejects.toMatchObject({ code: 'forbidden' });
    }
  });

  test('a stale write brings the set as it is now; the same points again move nothing', async () => {
    const lead = await studyWith(db, 'lead');
    const [a] = await criteriaOf(db, lead, 2);
    await save(lead, 'study', 0, { [a]: 40 });
    await expect(save(lead, 'study', 0, { [a]: 50 })).rejects.toMatchObject({
      code: 'stale',
      current: { points: { [a]: 40 }, version: 1 },
    });
    const before = await revisionOf(lead);
    expect(await save(lead, 'study', 1, { [a]: 40 })).toMatchObject({ version: 1, revision: before });
  });

  test('in review it is locked', async () => {
    const lead = await studyWith(db, 'lead', { state: 'in-review' });
    await expect(save(lead, 'study', 0, {})).rejects.toMatchObject({ code: 'study-locked' });
  });

  test('keeps its reason while it stands apart, and takes a new one', async () => {
    const lead = await studyWith(db, 'lead');
    const [a] = await criteriaOf(db, lead, 2);
    await state(lead, 'study', 0, { points: { [a]: 30 }, reason: 'Cost decides.' });
    expect(await save(lead, 'study', 1, { [a]: 40 })).toMatchObject({ reason: 'Cost decides.' });
    const before = await revisionOf(lead);
    expect(await state(lead, 'study', 2, { points: { [a]: 40 }, reason: 'Cost decides all.' })).toMatchObject(
      { reason: 'Cost decides all.', revision: (before ?? 0) + 1 },
    );
  });
});

describe('a member’s own set', () => {
  test('starts from the study’s, moves no revision and nobody else’s, and goes on in review', async () => {
    const lead = await studyWith(db, 'lead');
    const [a, b] = await criteriaOf(db, lead, 2);
    await save(lead, 'study', 0, { [a]: 30, [b]: 10 });
    const reviewer = await joined(db, { studyId: lead.studyId, role: 'reviewer' });
    expect(await read(reviewer, 'mine')).toMatchObject({ points: { [a]: 30, [b]: 10 }, version: 0 });
    await db.update(study).set({ state: 'in-review' }).where(eq(study.id, lead.studyId));
    const before = await revisionOf(lead);
    expect(await save(reviewer, 'mine', 0, { [a]: 5, [b]: 5 })).toMatchObject({
      version: 1,
      revision: before,
    });
    expect((await read(lead, 'mine')).points).toEqual({ [a]: 30, [b]: 10 });
    expect((await read(reviewer, 'study')).points).toEqual({ [a]: 30, [b]: 10 });
    await save(reviewer, 'mine', 1, { [a]: 6, [b]: 5 });
    expect((await read(reviewer, 'mine')).shares).toEqual({ [a]: 6 / 11, [b]: 5 / 11 });
  });

  test('stands in the record without its points until it is shared', async () => {
    const lead = await studyWith(db, 'lead');
    const [a] = await criteriaOf(db, lead, 2);
    await save(lead, 'mine', 0, { [a]: 30 });
    expect((await lastLine(lead))?.to).toEqual({ method: 'points', shared: false });
    expect(await state(lead, 'mine', 1, { points: { [a]: 30 }, shared: true })).toMatchObject({
      shared: true,
      version: 2,
    });
    expect((await lastLine(lead))?.to).toMatchObject({ points: { [a]: 30 }, shared: true });
  });
});

describe('the four ways', () => {
  /** Cost and Time under Business, Access by itself. */
  async function grouped() {
    const lead = await studyWith(db, 'lead');
    const [cost, time, access] = await criteriaOf(db, lead, 3);
    const business = await groupOf(db, lead, 'Business');
    await intoGroup(db, business, [cost, time]);
    return { lead, cost, time, access, business };
  }

  test('points: a group’s weight times the weight within it', async () => {
    const { lead, cost, time, access, business } = await grouped();
    const saved = await save(lead, 'study', 0, { [business]: 60, [access]: 20, [cost]: 10, [time]: 30 });
    expect(saved.shares).toEqual({ [cost]: 0.1875, [time]: 0.5625, [access]: 0.25 });
    expect(saved.levels.map(({ groupId, ids }) => ({ groupId, ids }))).toEqual([
      { groupId: null, ids: [business, access] },
      { groupId: business, ids: [cost, time] },
    ]);
    const { weights } = await loadRanking(db, { ...lead, weights: 'study' });
    expect([...weights]).toEqual([0.1875, 0.5625, 0.25]);
  });

  test('swing: the largest of each level has 100', async () => {
    const { lead, cost, time, access, business } = await grouped();
    const points = { [business]: 100, [access]: 50, [cost]: 100, [time]: 60 };
    await expect(
      state(lead, 'study', 0, { method: 'swing', points: { ...points, [cost]: 90 } }),
    ).rejects.toMatchObject({
      code: 'invalid',
      message:
        'The swing that matters most of the criteria of Business has 100; here the most is 90. Nothing was saved.',
      errors: [{ path: `points.${cost}` }],
    });
    const { shares } = await state(lead, 'study', 0, { method: 'swing', points });
    expect(shares?.[cost]).toBeCloseTo((2 / 3) * (100 / 160), 12);
  });

  test('pairwise: every pair of a level once, and the judgement that disagrees most', async () => {
    const lead = await studyWith(db, 'lead');
    const [a, b, c] = await criteriaOf(db, lead, 3);
    const judgements: [string, string, number][] = [
      [a, b, 2],
      [b, c, 2],
      [a, c, 1 / 2],
    ];
    const pairwise = (said: typeof judgements) =>
      state(lead, 'study', 0, { method: 'pairwise', judgements: said });
    await expect(pairwise(judgements.slice(0, 2))).rejects.toMatchObject({
      code: 'invalid',
      errors: [{ path: 'judgements', message: '1 judgement missing, the first A against C.' }],
    });
    await expect(pairwise([...judgements, [b, a, 3]])).rejects.toMatchObject({
      errors: [{ path: 'judgements.3', message: 'B against A is judged twice.' }],
    });
    const [{ consistency } = { consistency: null }] = (await pairwise(judgements)).levels;
    // A circle of equal judgements: λ_max = 1 + 2 cosh(ln(8)/3) = 3.5, index 0.25, over 0.58 [derived].
    expect(consistency?.lambdaMax).toBeCloseTo(3.5, 9);
    expect(consistency?.ratio).toBeCloseTo(0.25 / 0.58, 9);
  });

  test('pairwise: things of two levels, or more than ten of one, are not compared', async () => {
    const { lead, cost, access } = await grouped();
    await expect(
      state(lead, 'study', 0, { method: 'pairwise', judgements: [[cost, access, 2]] }),
    ).rejects.toMatchObject({ errors: [{ path: 'judgements.0' }] });
    const many = await studyWith(db, 'lead');
    await criteriaOf(db, many, 11);
    await expect(state(many, 'study', 0, { method: 'pairwise', judgements: [] })).rejects.toMatchObject({
      message:
        'Up to 10 things can be compared by pairs: the groups and single criteria are 11. Nothing was saved.',
    });
  });

  test('order: names each once, and gives rank-order centroid weights', async () => {
    const lead = await studyWith(db, 'lead');
    const [a, b, c] = await criteriaOf(db, lead, 3);
    const ordered = (order: string[]) => state(lead, 'study', 0, { method: 'centroid', order });
    await expect(ordered([a, b, a])).rejects.toMatchObject({ errors: [{ path: 'order.2' }] });
    await expect(ordered([b, a])).rejects.toMatchObject({
      errors: [{ path: 'order', message: 'The order leaves out C.' }],
    });
    const { shares } = await ordered([b, a, c]);
    // Barron & Barrett 1996, n = 3: 0.6111, 0.2778, 0.1111 [from memory]
    expect(shares?.[b]).toBeCloseTo(0.6111, 4);
    expect(shares?.[a]).toBeCloseTo(0.2778, 4);
    expect(shares?.[c]).toBeCloseTo(0.1111, 4);
  });

  test('what is added later has weight 0 until it is judged; other sets stay as they were', async () => {
    const lead = await studyWith(db, 'lead');
    const [a, b] = await criteriaOf(db, lead, 2);
    const judgements: [string, string, number][] = [[a, b, 3]];
    await state(lead, 'study', 0, { method: 'pairwise', judgements });
    const [, , c] = await criteriaOf(db, lead, 1, 2);
    const now = await read(lead, 'study');
    expect(now).toMatchObject({ levels: [{ unjudged: [c] }], judgements });
    expect(now.shares?.[a]).toBeCloseTo(0.75, 12);
    expect(now.shares?.[c]).toBe(0);
    // Sharing a set says nothing new of it, so what is missing is not asked for.
    await expect(
      state(lead, 'mine', 0, { method: 'pairwise', judgements, shared: true }),
    ).resolves.toMatchObject({ shared: true });
  });

  test('refuses what is no criterion and no group of the study, with its path', async () => {
    const lead = await studyWith(db, 'lead');
    const [a] = await criteriaOf(db, lead, 2);
    const stranger = newId();
    const inputs: [WeightsDraft, string][] = [
      [{ points: { [stranger]: 5 } }, `points.${stranger}`],
      [{ method: 'centroid', order: [a, stranger] }, 'order.1'],
      [{ method: 'pairwise', judgements: [[a, stranger, 2]] }, 'judgements.0.1'],
    ];
    for (const [input, path] of inputs)
      await expect(state(lead, 'study', 0, input)).rejects.toMatchObject({
        code: 'invalid',
        errors: [{ path, message: 'This is no weighed criterion or group of the study.' }],
      });
  });
});

import { asc, eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { CriterionInput } from '#contract/criterion.ts';
import { newId } from '#db/columns.ts';
import { record } from '#db/schema/record.ts';
import { study } from '#db/schema/study.ts';
import { addCriterion } from '#server/criteria/add-criterion.ts';
import type { Member } from '#server/member.ts';
import { readWeights } from '#server/weights/read-weights.ts';
import { saveWeights } from '#server/weights/save-weights.ts';
import { testDatabase } from '#tests/support/database.ts';
import { joined, studyWith } from '#tests/support/study.ts';

const { db } = await testDatabase();

type Whose = 'study' | 'mine';
const read = ({ studyId, userId }: Member, weights: Whose) => readWeights(db, { studyId, userId, weights });
const save = (member: Member, weights: Whose, version: number, points: Record<string, number>) =>
  saveWeights(db, { member, weights, version, input: { points } });
const revisionOf = async ({ studyId }: Member) => {
  const [row] = await db.select({ revision: study.revision }).from(study).where(eq(study.id, studyId));
  return row?.revision;
};
const criteriaOf = async (member: Member): Promise<[string, string]> => {
  const made = [];
  for (const name of ['A', 'B']) {
    const input = CriterionInput.parse({ source: 'entered', name, direction: 'more' });
    made.push((await addCriterion(db, { member, input })).id);
  }
  return made as [string, string];
};

describe('the study’s set', () => {
  test('starts unset, is normalised, moves the revision and is recorded', async () => {
    const lead = await studyWith(db, 'lead');
    const [a, b] = await criteriaOf(lead);
    expect(await read(lead, 'study')).toEqual({
      weights: 'study',
      points: { [a]: 0, [b]: 0 },
      shares: null,
      version: 0,
    });
    const before = await revisionOf(lead);
    const saved = await save(lead, 'study', 0, { [a]: 30, [b]: 10 });
    expect(saved).toMatchObject({
      version: 1,
      shares: { [a]: 0.75, [b]: 0.25 },
      revision: (before ?? 0) + 1,
    });
    const [line] = (
      await db.select().from(record).where(eq(record.studyId, lead.studyId)).orderBy(asc(record.id))
    ).slice(-1);
    expect(line).toMatchObject({ object: 'weights', from: { [a]: 0 }, to: { [a]: 30, [b]: 10 } });
  });

  test('is a lead’s alone to write', async () => {
    const lead = await studyWith(db, 'lead');
    const [a] = await criteriaOf(lead);
    for (const role of ['engineer', 'reviewer'] as const) {
      const member = await joined(db, { studyId: lead.studyId, role });
      await expect(save(member, 'study', 0, { [a]: 1 })).rejects.toMatchObject({ code: 'forbidden' });
    }
  });

  test('a stale write brings the set as it is now; the same points again move nothing', async () => {
    const lead = await studyWith(db, 'lead');
    const [a] = await criteriaOf(lead);
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

  test('refuses points for what is no criterion of the study', async () => {
    const lead = await studyWith(db, 'lead');
    await criteriaOf(lead);
    await expect(save(lead, 'study', 0, { [newId()]: 5 })).rejects.toMatchObject({ code: 'invalid' });
  });
});

describe('a member’s own set', () => {
  test('starts from the study’s, moves no revision and nobody else’s, and goes on in review', async () => {
    const lead = await studyWith(db, 'lead');
    const [a, b] = await criteriaOf(lead);
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
});

import { eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { StudyListQuery, StudyPatch } from '#contract/study.ts';
import { criterion, criterionGroup, weightSet } from '#db/schema/criterion.ts';
import { record } from '#db/schema/record.ts';
import { site } from '#db/schema/site.ts';
import { member as memberTable, study, studyVehicle, targetOrbit } from '#db/schema/study.ts';
import { newId } from '#db/columns.ts';
import type { AppError } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { createStudy } from '#server/studies/create-study.ts';
import { editStudy } from '#server/studies/edit-study.ts';
import { listStudies } from '#server/studies/read-studies.ts';
import { testDatabase } from '#tests/support/database.ts';
import { joined, person, studyWith } from '#tests/support/study.ts';

const { db } = await testDatabase();

const codeOf = (attempt: Promise<unknown>) =>
  attempt.then(
    () => 'done',
    (error: AppError) => error.code,
  );
const ask = (userId: string, query: object = {}) =>
  listStudies(db, { userId, ...StudyListQuery.parse(query) });
const maker = async () => {
  const { userId } = await person(db);
  return { userId, email: `${userId}@Spinward.test` };
};
const linesOf = (studyId: string) =>
  db.select().from(record).where(eq(record.studyId, studyId)).orderBy(record.id);

describe('the list', () => {
  test('holds the person’s own studies, latest change first, with the role in each', async () => {
    const first = await studyWith(db, 'lead', { title: 'First' });
    const second = await studyWith(db, 'lead', { title: 'Second' });
    await db
      .insert(memberTable)
      .values({ studyId: second.studyId, userId: first.userId, email: 'first@x.test', role: 'reader' });
    await studyWith(db, 'lead', { title: 'Not theirs' });
    await editStudy(db, { member: first, version: 1, patch: { question: 'Where from?' } });
    const list = await ask(first.userId);
    expect(list.items.map(({ title, role }) => [title, role])).toEqual([
      ['First', 'lead'],
      ['Second', 'reader'],
    ]);
    expect(list.total).toBe(2);
  });

  test('is searched by text, taken literally, by state and by archive, and comes in pages', async () => {
    const { userId, studyId } = await studyWith(db, 'lead', { title: '100 % coast' });
    const add = async (fields: object) => {
      const other = await studyWith(db, 'lead', fields);
      await db.update(memberTable).set({ userId }).where(eq(memberTable.id, other.memberId));
    };
    await add({ title: 'Inland', organisation: 'Coast Works', state: 'in-review' });
    await add({ title: 'Old coast', archivedAt: new Date() });
    const titles = async (query: object) => (await ask(userId, query)).items.map(({ title }) => title).sort();
    expect(await titles({ query: 'COAST' })).toEqual(['100 % coast', 'Inland']);
    expect(await titles({ query: '%' })).toEqual(['100 % coast']);
    expect(await titles({ query: '_' })).toEqual([]);
    expect(await titles({ state: 'in-review' })).toEqual(['Inland']);
    expect(await titles({ archived: 'true' })).toEqual(['Old coast']);
    expect(await titles({ archived: 'all' })).toHaveLength(3);
    expect(await ask(userId, { pageSize: '1', page: '3', archived: 'all' })).toMatchObject({ total: 3 });
    expect((await ask(userId, { pageSize: '1', page: '3', archived: 'all' })).items).toMatchObject([
      { id: studyId },
    ]);
  });
});

describe('editing', () => {
  test('writes what differs, moves version and revision, and records from and to', async () => {
    const member = await studyWith(db, 'engineer');
    const patch = { title: 'Trial', question: 'Where from?', decideBy: '2027-03-31' };
    const edited = await editStudy(db, { member, version: 1, patch });
    expect(edited).toMatchObject({
      question: 'Where from?',
      decideBy: '2027-03-31',
      version: 2,
      revision: 2,
    });
    expect(await linesOf(member.studyId)).toMatchObject([
      {
        object: 'study',
        action: 'change',
        from: { question: '', decideBy: null },
        to: { question: 'Where from?', decideBy: '2027-03-31' },
      },
    ]);
    const same = await editStudy(db, { member, version: 2, patch });
    expect(same).toMatchObject({ version: 2, revision: 2 });
    await expect(editStudy(db, { member, version: 1, patch: { title: 'Late' } })).rejects.toMatchObject({
      code: 'stale',
      current: { title: 'Trial', version: 2 },
    });
  });

  test('a lead archives and restores at any state; an archived study takes no other change', async () => {
    const member = await studyWith(db, 'lead', { state: 'in-review' });
    const archived = await editStudy(db, { member, version: 1, patch: { archived: true } });
    expect(archived).toMatchObject({ archived: true, state: 'in-review', version: 2, revision: 1 });
    expect(await codeOf(editStudy(db, { member, version: 2, patch: { title: 'Other' } }))).toBe(
      'study-archived',
    );
    const restored = await editStudy(db, { member, version: 2, patch: { archived: false } });
    expect(restored).toMatchObject({ archived: false, state: 'in-review', version: 3 });
    expect((await linesOf(member.studyId)).map(({ action }) => action)).toEqual(['archive', 'restore']);
  });

  test('an engineer neither archives nor restores', async () => {
    const member = await studyWith(db, 'engineer');
    expect(await codeOf(editStudy(db, { member, version: 1, patch: { archived: true } }))).toBe('forbidden');
  });

  test('archiving goes alone', () => {
    expect(StudyPatch.safeParse({ archived: true, title: 'Other' }).success).toBe(false);
    expect(StudyPatch.safeParse({ archived: true, version: 1 }).success).toBe(true);
  });
});

/** A study with an orbit, a criterion of it, one entered in a group, a rating, a site with a figure, weights and a vehicle. */
async function furnished(): Promise<Member> {
  const member = await studyWith(db, 'lead', {
    question: 'Where from?',
    turnSpeedFraction: 0.7,
    losses: 'flown',
  });
  const { studyId, userId } = member;
  const orbitId = newId();
  const [entered, rating, groupId] = [newId(), newId(), newId()];
  await db.insert(criterionGroup).values({ id: groupId, studyId, name: 'Time', nameKey: 'time' });
  await db.insert(targetOrbit).values({
    id: orbitId,
    studyId,
    position: 0,
    code: 'POL',
    perigeeM: 500_000,
    apogeeM: 500_000,
    inclinationDeg: 90,
  });
  const common = { studyId, direction: 'more' as const };
  await db.insert(criterion).values([
    {
      ...common,
      position: 0,
      name: 'Payload',
      nameKey: 'payload',
      source: 'computed',
      quantity: 'payload',
      orbitId,
    },
    {
      ...common,
      id: entered,
      position: 1,
      name: 'Days',
      nameKey: 'days',
      source: 'entered',
      groupId,
      shape: { kind: 'exponential', curvature: 2 },
    },
    {
      ...common,
      id: rating,
      position: 2,
      name: 'Road',
      nameKey: 'road',
      source: 'rating',
      ratingSteps: ['Track', 'Gravel', 'Two lanes', 'Trunk road', 'Motorway'],
    },
  ]);
  await db.insert(site).values([
    {
      studyId,
      code: 'TH',
      name: 'Tern Head',
      nameKey: 'tern head',
      latitudeDeg: 1,
      longitudeDeg: 2,
      values: { [entered]: 240 },
      particulars: { [entered]: { low: 200, high: 260 } },
    },
    {
      studyId,
      code: 'GO',
      name: 'Gone',
      nameKey: 'gone',
      latitudeDeg: 1,
      longitudeDeg: 2,
      deletedAt: new Date(),
    },
  ]);
  await db.insert(weightSet).values([
    {
      studyId,
      method: 'pairwise',
      points: { [entered]: 30, [groupId]: 5 },
      order: [rating, groupId],
      judgements: [
        [groupId, rating, 3],
        [newId(), rating, 5],
      ],
    },
    { studyId, userId, points: { [entered]: 99 } },
  ]);
  await db.insert(studyVehicle).values({ studyId, spec: { name: 'Trial lifter' } });
  return member;
}

describe('making', () => {
  test('a blank study is a draft at revision 1 with its maker as lead', async () => {
    const who = await maker();
    const made = await createStudy(db, { maker: who, input: { title: 'New', from: 'blank' } });
    expect(made).toMatchObject({ title: 'New', state: 'draft', role: 'lead', revision: 1, version: 1 });
    const members = await db.select().from(memberTable).where(eq(memberTable.studyId, made.id));
    expect(members).toMatchObject([{ userId: who.userId, role: 'lead', email: who.email.toLowerCase() }]);
    expect(await linesOf(made.id)).toMatchObject([{ object: 'study', action: 'add', userId: who.userId }]);
  });

  test('a copy takes requirement, vehicle, sites with figures, criteria and the study’s weights, under new ids', async () => {
    const source = await furnished();
    const reader = await joined(db, { studyId: source.studyId, role: 'reader' });
    const made = await createStudy(db, {
      maker: { userId: reader.userId, email: 'reader@x.test' },
      input: { title: 'Copy', from: source.studyId },
    });
    expect(made).toMatchObject({ title: 'Copy', question: 'Where from?', role: 'lead', revision: 1 });
    const where = { studyId: made.id };
    const [orbit] = await db.select().from(targetOrbit).where(eq(targetOrbit.studyId, where.studyId));
    const criteria = await db.select().from(criterion).where(eq(criterion.studyId, where.studyId));
    const sites = await db.select().from(site).where(eq(site.studyId, where.studyId));
    const sets = await db.select().from(weightSet).where(eq(weightSet.studyId, where.studyId));
    const [vehicle] = await db.select().from(studyVehicle).where(eq(studyVehicle.studyId, where.studyId));
    const [head] = await db.select().from(study).where(eq(study.id, where.studyId));
    const payload = criteria.find(({ name }) => name === 'Payload');
    const days = criteria.find(({ name }) => name === 'Days')?.id ?? '';
    expect(orbit).toMatchObject({ code: 'POL', inclinationDeg: 90 });
    expect(payload).toMatchObject({ quantity: 'payload', orbitId: orbit?.id });
    const road = criteria.find(({ name }) => name === 'Road');
    const [group] = await db.select().from(criterionGroup).where(eq(criterionGroup.studyId, where.studyId));
    expect(group).toMatchObject({ name: 'Time', nameKey: 'time' });
    expect(criteria.find(({ name }) => name === 'Days')).toMatchObject({
      groupId: group?.id,
      shape: { kind: 'exponential', curvature: 2 },
    });
    expect(road).toMatchObject({
      groupId: null,
      ratingSteps: ['Track', 'Gravel', 'Two lanes', 'Trunk road', 'Motorway'],
    });
    expect(sites).toMatchObject([
      { code: 'TH', values: { [days]: 240 }, particulars: { [days]: { low: 200, high: 260 } } },
    ]);
    // The judgement against what was removed before still says that the road has been judged.
    expect(sets).toMatchObject([
      {
        userId: null,
        method: 'pairwise',
        points: { [days]: 30, [group?.id ?? '']: 5 },
        order: [road?.id, group?.id],
        judgements: [
          [group?.id, road?.id, 3],
          [expect.any(String), road?.id, 5],
        ],
      },
    ]);
    expect(vehicle).toMatchObject({ spec: { name: 'Trial lifter' } });
    expect(head).toMatchObject({ turnSpeedFraction: 0.7, losses: 'flown' });
    const [theirs] = await db.select().from(targetOrbit).where(eq(targetOrbit.studyId, source.studyId));
    expect(orbit?.id).not.toBe(theirs?.id);
    expect(await linesOf(made.id)).toMatchObject([
      { to: { origin: 'copy', studyId: source.studyId, revision: 1, orbits: 1, sites: 1, criteria: 3 } },
    ]);
  });

  test('a study one is not a member of is not there to copy', async () => {
    const source = await furnished();
    const who = await maker();
    for (const from of [source.studyId, newId()])
      expect(await codeOf(createStudy(db, { maker: who, input: { title: 'Copy', from } }))).toBe('not-found');
    expect((await ask(who.userId)).total).toBe(0);
  });

  test('the example is complete: orbits, a vehicle, sites, criteria and weights', async () => {
    const who = await maker();
    const made = await createStudy(db, { maker: who, input: { title: 'Look round', from: 'example' } });
    const [line] = await linesOf(made.id);
    expect(line?.to).toMatchObject({ origin: 'example', orbits: 5, sites: 12, criteria: 7 });
    const [vehicle] = await db.select().from(studyVehicle).where(eq(studyVehicle.studyId, made.id));
    expect(vehicle?.spec).toHaveProperty('stages');
    const [weights] = await db.select().from(weightSet).where(eq(weightSet.studyId, made.id));
    expect(Object.values(weights?.points ?? {})).toHaveLength(7);
  });
});

import { asc, eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { CriterionInput, CriterionPatch, type CriterionDraft } from '#contract/criterion.ts';
import { newId } from '#db/columns.ts';
import { record } from '#db/schema/record.ts';
import { evidence, site } from '#db/schema/site.ts';
import { study, targetOrbit } from '#db/schema/study.ts';
import { addCriterion } from '#server/criteria/add-criterion.ts';
import { addGroup } from '#server/criteria/groups/add-group.ts';
import { changeCriterion } from '#server/criteria/change-criterion.ts';
import { listCriteriaPage, readCriteria, readCriterion } from '#server/criteria/read-criteria.ts';
import { removeCriterion } from '#server/criteria/remove-criterion.ts';
import type { Member } from '#server/member.ts';
import { testDatabase } from '#tests/support/database.ts';
import { studyWith } from '#tests/support/study.ts';

const { db } = await testDatabase();

const cost: CriterionDraft = { source: 'entered', name: 'Cost', unit: 'M€', direction: 'less' };
const add = (member: Member, draft: CriterionDraft = cost) =>
  addCriterion(db, { member, input: CriterionInput.parse(draft) });
const patch = (member: Member, criterionId: string, version: number, fields: CriterionPatch) =>
  changeCriterion(db, { member, criterionId, version, patch: CriterionPatch.parse(fields) });
const namesOf = async ({ studyId }: Member) =>
  (await readCriteria(db, { studyId })).map(({ name, position }) => `${position} ${name}`);
const linesOf = ({ studyId }: Member) =>
  db.select().from(record).where(eq(record.studyId, studyId)).orderBy(asc(record.id));
const orbitOf = async ({ studyId }: Member, name: string) => {
  const id = newId();
  const orbit = {
    id,
    studyId,
    position: 0,
    code: 'O1',
    name,
    perigeeM: 5e5,
    apogeeM: 5e5,
    inclinationDeg: 51.6,
  };
  await db.insert(targetOrbit).values(orbit);
  return id;
};

describe('adding', () => {
  test('an entered criterion comes last, with levels from the candidates and no limit, on the record', async () => {
    const member = await studyWith(db, 'engineer');
    await add(member);
    const second = await add(member, { ...cost, name: 'Launch days', direction: 'more' });
    expect(second).toMatchObject({
      position: 1,
      unit: 'M€',
      levels: { mode: 'candidates' },
      limit: null,
      version: 1,
      revision: 3,
    });
    expect((await linesOf(member)).at(-1)).toMatchObject({
      object: 'criterion',
      action: 'add',
      revision: 3,
      to: { name: 'Launch days', direction: 'more' },
    });
  });

  test('a computed one takes name, unit and direction from its quantity and orbit', async () => {
    const member = await studyWith(db, 'engineer');
    const orbitId = await orbitOf(member, 'Station');
    expect(await add(member, { source: 'computed', quantity: 'payload', orbitId })).toMatchObject({
      name: 'Payload to Station',
      unit: 'kg',
      direction: 'more',
      orbitId,
    });
    expect(await add(member, { source: 'computed', quantity: 'turn' })).toMatchObject({
      name: 'Turn, worst orbit',
      unit: '°',
      direction: 'less',
    });
  });

  test('a name already there is refused whatever its case and spacing, as is an orbit of another study', async () => {
    const member = await studyWith(db, 'engineer');
    await add(member);
    await expect(add(member, { ...cost, name: ' cost ' })).rejects.toMatchObject({
      code: 'invalid',
      errors: [{ path: 'name' }],
    });
    const elsewhere = await orbitOf(await studyWith(db, 'engineer'), 'Polar');
    await expect(
      add(member, { source: 'computed', quantity: 'payload', orbitId: elsewhere }),
    ).rejects.toMatchObject({ code: 'invalid', errors: [{ path: 'orbitId' }] });
    expect(await namesOf(member)).toEqual(['0 Cost']);
  });

  test.each<[string, unknown]>([
    ['payload without its orbit', { source: 'computed', quantity: 'payload' }],
    ['payload a year for one orbit', { source: 'computed', quantity: 'payload-per-year', orbitId: newId() }],
    ['an unknown quantity', { source: 'computed', quantity: 'beauty' }],
    ['levels against the direction', { ...cost, levels: { mode: 'fixed', worst: 1, best: 2 } }],
    ['equal levels', { ...cost, levels: { mode: 'fixed', worst: 1, best: 1 } }],
    ['no name', { ...cost, name: ' ' }],
    ['an unknown key', { ...cost, weight: 3 }],
  ])('refuses %s', (_, draft) => {
    expect(CriterionInput.safeParse(draft).success).toBe(false);
  });

  test('in review the inputs are locked', async () => {
    const member = await studyWith(db, 'engineer', { state: 'in-review' });
    await expect(add(member)).rejects.toMatchObject({ code: 'study-locked' });
  });
});

describe('changing', () => {
  test('writes what is sent, moves version and revision, and records from and to', async () => {
    const member = await studyWith(db, 'engineer');
    const { id } = await add(member);
    const changed = await patch(member, id, 1, {
      levels: { mode: 'fixed', worst: 400, best: 200 },
      limit: { kind: 'at-most', value: 380.5 },
    });
    expect(changed).toMatchObject({ name: 'Cost', version: 2, revision: 3, limit: { value: 380.5 } });
    expect((await linesOf(member)).at(-1)).toMatchObject({
      action: 'change',
      from: { limit: null, levels: { mode: 'candidates' } },
      to: { limit: { kind: 'at-most', value: 380.5 }, levels: { worst: 400, best: 200 } },
    });
    expect(await patch(member, id, 2, { levels: { mode: 'candidates' } })).toMatchObject({
      levels: { mode: 'candidates' },
      limit: { value: 380.5 },
    });
  });

  test('a stale change is refused with what there is now', async () => {
    const member = await studyWith(db, 'engineer');
    const { id } = await add(member);
    await patch(member, id, 1, { unit: 'k€' });
    await expect(patch(member, id, 1, { unit: '€' })).rejects.toMatchObject({
      code: 'stale',
      current: { unit: 'k€', version: 2 },
    });
  });

  test('turning the direction under fixed levels is refused, and so is a computed one’s unit', async () => {
    const member = await studyWith(db, 'engineer');
    const { id } = await add(member, { ...cost, levels: { mode: 'fixed', worst: 400, best: 200 } });
    await expect(patch(member, id, 1, { direction: 'more' })).rejects.toMatchObject({
      code: 'invalid',
      errors: [{ path: 'levels.best' }],
    });
    const computed = await add(member, { source: 'computed', quantity: 'turn' });
    await expect(patch(member, computed.id, 1, { unit: 'rad' })).rejects.toMatchObject({ code: 'invalid' });
  });

  test('moving one closes the gap it leaves and makes no other edit stale', async () => {
    const member = await studyWith(db, 'engineer');
    const [a, , c] = [
      await add(member),
      await add(member, { ...cost, name: 'B' }),
      await add(member, { ...cost, name: 'C' }),
    ];
    if (!a || !c) throw new Error('no criteria');
    await patch(member, c.id, 1, { position: 0 });
    expect(await namesOf(member)).toEqual(['0 C', '1 Cost', '2 B']);
    await patch(member, a.id, 1, { position: 99 });
    expect(await namesOf(member)).toEqual(['0 C', '1 B', '2 Cost']);
  });
});

describe('shape, group and steps', () => {
  const knots: CriterionPatch = { shape: { kind: 'piecewise', knots: [[0, 0], [0.4, 0.7], [1, 1]] } }; // prettier-ignore

  test('are kept as they are sent, on adding and on changing', async () => {
    const member = await studyWith(db, 'engineer');
    const group = await addGroup(db, { member, name: 'Money' });
    const made = await add(member, {
      ...cost,
      groupId: group.id,
      shape: { kind: 'exponential', curvature: 2.5 },
    });
    expect(made).toMatchObject({
      groupId: group.id,
      shape: { kind: 'exponential', curvature: 2.5 },
      steps: null,
    });
    expect(await patch(member, made.id, 1, knots)).toMatchObject({ ...knots, groupId: group.id, version: 2 });
    expect(await patch(member, made.id, 2, { groupId: null })).toMatchObject({ ...knots, groupId: null });
    expect((await linesOf(member)).at(-1)).toMatchObject({
      object: 'criterion',
      from: { groupId: group.id },
      to: { groupId: null },
    });
  });

  test('levels of a computed one run the way its quantity is better, where no direction is given', () => {
    const levels = { mode: 'fixed', worst: 8_000, best: 9_000 };
    const given = { source: 'computed', quantity: 'delta-v', levels };
    expect(CriterionInput.safeParse(given).error?.issues).toMatchObject([{ path: ['levels', 'best'] }]);
    expect(CriterionInput.safeParse({ ...given, direction: 'more' }).success).toBe(true);
  });

  test('a rating has five named steps, its levels 0 and 4, and keeps unit and source', async () => {
    const member = await studyWith(db, 'engineer');
    const rating = await add(member, { source: 'rating', name: 'Road access' });
    expect(rating).toMatchObject({
      source: 'rating',
      unit: '',
      steps: ['Very poor', 'Poor', 'Fair', 'Good', 'Very good'],
      levels: { mode: 'fixed', worst: 0, best: 4 },
    });
    const noise = await add(member, { source: 'rating', name: 'Noise', direction: 'less' });
    expect(noise.levels).toEqual({ mode: 'fixed', worst: 4, best: 0 });
    const steps = ['Track', 'Gravel', 'Two lanes', 'Trunk road', 'Motorway'];
    expect(await patch(member, rating.id, 1, { steps })).toMatchObject({ steps, version: 2 });
    await expect(patch(member, rating.id, 2, { source: 'entered' })).rejects.toMatchObject({
      code: 'invalid',
    });
    const entered = await add(member);
    await expect(patch(member, entered.id, 1, { steps })).rejects.toMatchObject({
      code: 'invalid',
      errors: [{ path: 'steps' }],
    });
  });

  test('a group of another study is refused', async () => {
    const member = await studyWith(db, 'engineer');
    const elsewhere = await addGroup(db, { member: await studyWith(db, 'engineer'), name: 'Money' });
    const refused = { code: 'invalid', errors: [{ path: 'groupId' }] };
    await expect(add(member, { ...cost, groupId: elsewhere.id })).rejects.toMatchObject(refused);
    const { id } = await add(member);
    await expect(patch(member, id, 1, { groupId: elsewhere.id })).rejects.toMatchObject(refused);
  });

  test.each<[string, CriterionPatch]>([
    ['a curvature beyond 20', { shape: { kind: 'exponential', curvature: 21 } }],
    ['points that fall', { shape: { kind: 'piecewise', knots: [[0, 0], [0.2, 0.5], [0.6, 0.4], [1, 1]] } }], // prettier-ignore
    ['points that do not end at 1', { shape: { kind: 'piecewise', knots: [[0, 0], [1, 0.9]] } }], // prettier-ignore
    ['six points', { shape: { kind: 'piecewise', knots: [0, 0.2, 0.4, 0.6, 0.8, 1].map((s) => [s, s]) } }],
    ['four steps', { steps: ['a', 'b', 'c', 'd'] }],
    ['two steps of one name', { steps: ['a', 'b', 'c', 'd', 'A'] }],
  ])('refuses %s', (_, fields) => {
    expect(CriterionPatch.safeParse(fields).success).toBe(false);
  });
});

describe('removing', () => {
  test('takes its figures, particulars and evidence out of the sites, keeps them in the record and closes the order', async () => {
    const member = await studyWith(db, 'engineer');
    const { studyId } = member;
    const { id } = await add(member);
    const other = await add(member, { ...cost, name: 'Days' });
    const siteId = newId();
    await db.insert(site).values({
      id: siteId,
      studyId,
      code: 'AA',
      name: 'A',
      nameKey: 'a',
      latitudeDeg: 1,
      longitudeDeg: 2,
      values: { [id]: 12.5, [other.id]: 3 },
      particulars: { [id]: { low: 10, high: 15 }, [other.id]: { source: 'survey' } },
    });
    const file = (criterionId: string) => ({
      id: newId(),
      studyId,
      siteId,
      criterionId,
      fileName: 'quote.csv',
      mediaType: 'text/csv',
      bytes: Buffer.from('a,b'),
      sha256: '0',
      createdBy: member.userId,
    });
    const [ours, others] = [file(id), file(other.id)];
    await db.insert(evidence).values([ours, others]);
    await removeCriterion(db, { member, criterionId: id, version: 1 });
    const [row] = await db
      .select({ values: site.values, particulars: site.particulars })
      .from(site)
      .where(eq(site.id, siteId));
    expect(row).toEqual({
      values: { [other.id]: 3 },
      particulars: { [other.id]: { source: 'survey' } },
    });
    const files = await db
      .select({ id: evidence.id, removedAt: evidence.removedAt })
      .from(evidence)
      .where(eq(evidence.siteId, siteId));
    expect(files.find(({ id: fileId }) => fileId === ours.id)?.removedAt).toBeInstanceOf(Date);
    expect(files.find(({ id: fileId }) => fileId === others.id)?.removedAt).toBeNull();
    expect(await namesOf(member)).toEqual(['0 Days']);
    expect((await linesOf(member)).at(-1)).toMatchObject({
      action: 'remove',
      from: {
        name: 'Cost',
        figures: { [siteId]: 12.5 },
        particulars: { [siteId]: { low: 10, high: 15 } },
        evidence: [ours.id],
      },
      to: null,
    });
  });

  test('a stale removal, and one of another study’s criterion, change nothing', async () => {
    const member = await studyWith(db, 'engineer');
    const { id } = await add(member);
    await patch(member, id, 1, { unit: '€' });
    await expect(removeCriterion(db, { member, criterionId: id, version: 1 })).rejects.toMatchObject({
      code: 'stale',
    });
    const stranger = await studyWith(db, 'lead');
    await expect(
      removeCriterion(db, { member: stranger, criterionId: id, version: 2 }),
    ).rejects.toMatchObject({ code: 'not-found' });
    expect(await namesOf(member)).toEqual(['0 Cost']);
  });
});

test('lists in their order, by part of a name and by page', async () => {
  const member = await studyWith(db, 'engineer');
  for (const name of ['Cost', 'Days', 'Cost of land']) await add(member, { ...cost, name });
  const page = (query: string, pageNumber: number, pageSize: number) =>
    listCriteriaPage(db, { studyId: member.studyId, query, page: pageNumber, pageSize });
  expect(await page('cost', 2, 1)).toMatchObject({ total: 2, items: [{ name: 'Cost of land' }] });
  await expect(readCriterion(db, { studyId: member.studyId, criterionId: newId() })).rejects.toMatchObject({
    code: 'not-found',
  });
  const [row] = await db.select({ revision: study.revision }).from(study).where(eq(study.id, member.studyId));
  expect(row?.revision).toBe(4);
});

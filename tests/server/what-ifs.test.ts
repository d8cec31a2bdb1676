import { asc, eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { CriterionInput } from '#contract/criterion.ts';
import { ListQuery } from '#contract/list.ts';
import { SiteInput } from '#contract/site.ts';
import { pointsStatement } from '#contract/weights.ts';
import { WhatIfInput, type WhatIfChanges } from '#contract/what-if.ts';
import { newId } from '#db/columns.ts';
import { record } from '#db/schema/record.ts';
import { study } from '#db/schema/study.ts';
import { addCriterion } from '#server/criteria/add-criterion.ts';
import { readCriteria } from '#server/criteria/read-criteria.ts';
import { removeCriterion } from '#server/criteria/remove-criterion.ts';
import type { Member } from '#server/member.ts';
import { addSite } from '#server/sites/add-site.ts';
import { readSite } from '#server/sites/read-sites.ts';
import { removeSites } from '#server/sites/remove-sites.ts';
import { restoreSites } from '#server/sites/restore-sites.ts';
import { readWeights } from '#server/weights/read-weights.ts';
import { saveWeights } from '#server/weights/save-weights.ts';
import { adoptWhatIf } from '#server/what-ifs/adopt-what-if.ts';
import { changeWhatIf } from '#server/what-ifs/change-what-if.ts';
import { keepWhatIf } from '#server/what-ifs/keep-what-if.ts';
import { letWhatIfGo } from '#server/what-ifs/let-what-if-go.ts';
import { readWhatIf, readWhatIfs } from '#server/what-ifs/read-what-ifs.ts';
import { testDatabase } from '#tests/support/database.ts';
import { joined, studyWith } from '#tests/support/study.ts';

const { db } = await testDatabase();

type Fields = Partial<typeof study.$inferInsert>;
const studyRow = async ({ studyId }: Member) => {
  const [row] = await db.select().from(study).where(eq(study.id, studyId));
  if (!row) throw new Error('no study');
  return row;
};
const put = ({ studyId }: Member, fields: Fields) =>
  db.update(study).set(fields).where(eq(study.id, studyId));
const linesOf = ({ studyId }: Member) =>
  db.select().from(record).where(eq(record.studyId, studyId)).orderBy(asc(record.id));
const list = (member: Member, query = '') => readWhatIfs(db, { ...member, ...ListQuery.parse({ query }) });
const keep = (member: Member, input: { name?: string; shared?: boolean; changes?: Partial<WhatIfChanges> }) =>
  keepWhatIf(db, { member, input: WhatIfInput.parse({ name: 'Dearer land', changes: {}, ...input }) });
const adopt = async (
  member: Member,
  { id, version }: { id: string; version: number },
  over: { revision?: number; version?: number } = {},
) =>
  adoptWhatIf(db, {
    member,
    whatIfId: id,
    version: over.version ?? version,
    adoption: {
      reason: 'The land was valued anew.',
      revision: over.revision ?? (await studyRow(member)).revision,
    },
  });

/** A study with two entered criteria, a rating, and two sites with figures. */
async function trial() {
  const lead = await studyWith(db, 'lead');
  const made = async (input: unknown) =>
    (await addCriterion(db, { member: lead, input: CriterionInput.parse(input) })).id;
  const cost = await made({
    source: 'entered',
    name: 'Cost',
    direction: 'less',
    limit: { kind: 'at-most', value: 390 },
  });
  const days = await made({ source: 'entered', name: 'Launch days', direction: 'more' });
  const access = await made({ source: 'rating', name: 'Access' });
  const site = (name: string, latitudeDeg: number, figure: number) =>
    addSite(db, {
      member: lead,
      input: SiteInput.parse({
        name,
        latitudeDeg,
        longitudeDeg: 20,
        values: { [cost]: figure, [days]: 200, [access]: 3 },
        particulars: { [cost]: { low: figure - 20, high: figure + 20, source: 'Survey' } },
      }),
    });
  const near = await site('Near', 5, 250);
  const far = await site('Far', -9, 300);
  await saveWeights(db, {
    member: lead,
    weights: 'study',
    version: 0,
    input: { points: { [cost]: 60, [days]: 40 }, reason: 'Agreed in June.' },
  });
  const engineer = await joined(db, { studyId: lead.studyId, role: 'engineer', name: 'Tomas Okoye' });
  const reviewer = await joined(db, { studyId: lead.studyId, role: 'reviewer' });
  const reader = await joined(db, { studyId: lead.studyId, role: 'reader' });
  return { lead, engineer, reviewer, reader, cost, days, access, near, far };
}

describe('a private what-if', () => {
  test('is seen by its maker alone, and nothing of it stands in the record or moves the study', async () => {
    const { lead, engineer, reader, cost } = await trial();
    const before = { row: await studyRow(lead), lines: (await linesOf(lead)).length };
    const kept = await keep(engineer, { name: 'A secret guess', changes: { limits: { [cost]: null } } });
    const renamed = await changeWhatIf(db, {
      member: engineer,
      whatIfId: kept.id,
      version: 1,
      patch: { name: 'Still secret' },
    });
    expect(renamed).toMatchObject({ name: 'Still secret', mine: true, shared: false, version: 2 });
    expect((await list(engineer)).items.map(({ id }) => id)).toEqual([kept.id]);
    for (const member of [lead, reader]) {
      expect((await list(member)).total).toBe(0);
      await expect(readWhatIf(db, { ...member, whatIfId: kept.id })).rejects.toMatchObject({
        code: 'not-found',
      });
    }
    const request = { member: lead, whatIfId: kept.id, version: 2 };
    await expect(changeWhatIf(db, { ...request, patch: {} })).rejects.toMatchObject({ code: 'not-found' });
    await expect(letWhatIfGo(db, request)).rejects.toMatchObject({ code: 'not-found' });
    await expect(adopt(lead, renamed)).rejects.toMatchObject({ code: 'not-found' });
    await letWhatIfGo(db, { ...request, member: engineer });
    expect((await list(engineer)).total).toBe(0);
    expect(await studyRow(lead)).toEqual(before.row);
    expect(await linesOf(lead)).toHaveLength(before.lines);
  });

  test('goes on in review and stops in an archived study', async () => {
    const { lead, reviewer } = await trial();
    await put(lead, { state: 'in-review' });
    expect(await keep(reviewer, {})).toMatchObject({ version: 1, mine: true });
    await put(lead, { archivedAt: new Date() });
    await expect(keep(reviewer, {})).rejects.toMatchObject({ code: 'study-archived' });
  });
});

describe('a shared what-if', () => {
  test('is seen by every member, is its maker’s alone to change, and stands in the record', async () => {
    const { lead, engineer, reader, days } = await trial();
    const kept = await keep(engineer, { changes: { limits: { [days]: { kind: 'at-least', value: 180 } } } });
    const { revision } = await studyRow(lead);
    const shared = await changeWhatIf(db, {
      member: engineer,
      whatIfId: kept.id,
      version: 1,
      patch: { shared: true },
    });
    expect(shared.revision).toBe(revision);
    expect((await linesOf(lead)).at(-1)).toMatchObject({
      object: 'what-if',
      action: 'share',
      userId: engineer.userId,
      to: { name: 'Dearer land' },
    });
    expect((await list(reader, 'okoye')).items).toMatchObject([
      { id: kept.id, mine: false, by: { userId: engineer.userId, name: 'Tomas Okoye' } },
    ]);
    const request = { member: lead, whatIfId: kept.id, version: 2 };
    await expect(changeWhatIf(db, { ...request, patch: { name: 'Mine now' } })).rejects.toMatchObject({
      code: 'forbidden',
    });
    await expect(letWhatIfGo(db, request)).rejects.toMatchObject({ code: 'forbidden' });
    const own = { ...request, member: engineer };
    await expect(letWhatIfGo(db, { ...own, version: 1 })).rejects.toMatchObject({
      code: 'stale',
      current: { version: 2 },
    });
    await changeWhatIf(db, { ...own, patch: { shared: false } });
    expect((await linesOf(lead)).at(-1)).toMatchObject({ action: 'unshare' });
    expect((await list(lead)).total).toBe(0);
  });
});

describe('what it may name', () => {
  test('is the study’s: other sites, computed and text criteria and half steps are refused by their paths', async () => {
    const { lead, cost, access, near } = await trial();
    const elsewhere = await trial();
    const text = await addCriterion(db, {
      member: lead,
      input: CriterionInput.parse({ source: 'text', name: 'Owner', direction: 'more' }),
    });
    const computed = await addCriterion(db, {
      member: lead,
      input: CriterionInput.parse({ source: 'computed', quantity: 'payload-per-year' }),
    });
    const figure = (siteId: string, criterionId: string, value: number) => ({
      figures: [{ siteId, criterionId, value }],
    });
    const pathOf = (changes: Partial<WhatIfChanges>) =>
      keep(lead, { changes }).then(
        () => null,
        (error: { errors: { path: string }[] }) => error.errors[0]?.path,
      );
    expect(await pathOf(figure(elsewhere.near.id, cost, 1))).toBe('changes.figures.0.siteId');
    expect(await pathOf(figure(near.id, elsewhere.cost, 1))).toBe('changes.figures.0.criterionId');
    expect(await pathOf(figure(near.id, computed.id, 1))).toBe('changes.figures.0.criterionId');
    expect(await pathOf(figure(near.id, text.id, 1))).toBe('changes.figures.0.criterionId');
    expect(await pathOf(figure(near.id, access, 2.5))).toBe('changes.figures.0.value');
    expect(await pathOf({ leftOut: [elsewhere.near.id] })).toBe('changes.leftOut.0');
    expect(await pathOf({ limits: { [elsewhere.cost]: null } })).toMatch(/^changes\.limits\./);
    expect(await pathOf({ limits: { [text.id]: null } })).toMatch(/^changes\.limits\./);
    expect(await pathOf({ weights: pointsStatement({ [newId()]: 5 }) })).toMatch(/^points\./);
    const [one] = figure(near.id, cost, 1).figures;
    expect(await pathOf({ figures: one ? [one, one] : [] })).toBe('changes.figures.1');
    expect((await list(lead)).total).toBe(0);
  });

  test('may outlive its site and its criterion: such entries stay and can be saved again', async () => {
    const { lead, days, near, far } = await trial();
    const changes = {
      limits: { [days]: { kind: 'at-least' as const, value: 10 } },
      figures: [{ siteId: near.id, criterionId: days, value: 150 }],
      leftOut: [far.id],
    };
    const kept = await keep(lead, { changes });
    await removeSites(db, { member: lead, removal: { sites: [{ id: far.id, version: far.version }] } });
    await removeCriterion(db, { member: lead, criterionId: days, version: 1 });
    const again = await changeWhatIf(db, {
      member: lead,
      whatIfId: kept.id,
      version: 1,
      patch: { changes: { ...kept.changes, limits: changes.limits } },
    });
    expect(again.changes).toMatchObject(changes);
    await expect(adopt(lead, again)).rejects.toMatchObject({ code: 'invalid' });
  });
});

describe('adoption', () => {
  const everything = ({ cost, days, near, far }: Awaited<ReturnType<typeof trial>>) => ({
    weights: pointsStatement({ [cost]: 20, [days]: 80 }),
    limits: { [cost]: { kind: 'at-most' as const, value: 350 } },
    figures: [
      { siteId: near.id, criterionId: cost, value: 275 },
      { siteId: near.id, criterionId: days, value: null },
    ],
    leftOut: [far.id],
  });

  test('writes everything in one revision, tells what falls away, and every line names the what-if', async () => {
    const study = await trial();
    const { lead, engineer, cost, days, access, near, far } = study;
    const kept = await keep(engineer, { shared: true, changes: everything(study) });
    const before = { row: await studyRow(lead), lines: (await linesOf(lead)).length };
    const adopted = await adopt(lead, kept);
    expect(adopted).toMatchObject({
      revision: before.row.revision + 1,
      weights: true,
      limits: [cost],
      removed: [far.id],
      dropped: [{ siteId: near.id, criterionId: cost, parts: ['high'] }],
      ignored: 0,
    });
    const { studyId, userId } = lead;
    expect(await readWeights(db, { studyId, userId, weights: 'study' })).toMatchObject({
      points: { [cost]: 20, [days]: 80 },
      origin: { kind: 'apart', by: { userId, name: lead.name } },
      reason: 'The land was valued anew.',
    });
    expect((await readCriteria(db, { studyId })).find(({ id }) => id === cost)?.limit).toEqual({
      kind: 'at-most',
      value: 350,
    });
    const site = await readSite(db, { studyId, siteId: near.id });
    expect(site.values).toEqual({ [cost]: 275, [access]: 3 });
    expect(site.particulars).toEqual({ [cost]: { low: 230, source: 'Survey' } });
    await expect(readSite(db, { studyId, siteId: far.id })).rejects.toMatchObject({ code: 'not-found' });
    const lines = (await linesOf(lead)).slice(before.lines);
    expect(lines.map(({ object, action }) => `${object} ${action}`)).toEqual([
      'what-if adopt',
      'criterion change',
      'site change',
      'site remove',
      'weights change',
    ]);
    expect(lines[0]?.to).toMatchObject({
      name: 'Dearer land',
      by: 'Tomas Okoye',
      reason: 'The land was valued anew.',
    });
    for (const line of lines.slice(1)) expect(line.to).toMatchObject({ whatIf: 'Dearer land' });
    const { items } = await restoreSites(db, { member: lead, siteIds: [far.id] });
    expect(items[0]).toMatchObject({ name: 'Far', values: { [cost]: 300 } });
  });

  test('a lead adopts a private one of their own; once adopted it would change nothing more', async () => {
    const study = await trial();
    const kept = await keep(study.lead, { changes: { limits: everything(study).limits } });
    expect(await adopt(study.lead, kept)).toMatchObject({ weights: false, removed: [] });
    await expect(adopt(study.lead, kept)).rejects.toMatchObject({ code: 'invalid' });
  });

  test('leaves alone what has gone and counts it', async () => {
    const study = await trial();
    const { lead, far, days } = study;
    const kept = await keep(lead, { changes: everything(study) });
    await removeSites(db, { member: lead, removal: { sites: [{ id: far.id, version: far.version }] } });
    await removeCriterion(db, { member: lead, criterionId: days, version: 1 });
    // The weight and the figure under Launch days, and Far left out.
    expect(await adopt(lead, kept)).toMatchObject({ ignored: 3, removed: [], weights: true });
  });

  test('is refused whole where the study or the what-if moved on, or the study is locked', async () => {
    const study = await trial();
    const { lead, cost } = study;
    const kept = await keep(lead, { changes: everything(study) });
    const { revision } = await studyRow(lead);
    const lines = (await linesOf(lead)).length;
    await expect(adopt(lead, kept, { revision: revision - 1 })).rejects.toMatchObject({
      code: 'stale',
      current: { revision },
    });
    await expect(adopt(lead, kept, { version: 7 })).rejects.toMatchObject({
      code: 'stale',
      current: { id: kept.id, version: 1 },
    });
    await put(lead, { state: 'in-review' });
    await expect(adopt(lead, kept)).rejects.toMatchObject({ code: 'study-locked' });
    const weightsAlone = await keep(lead, { changes: { weights: everything(study).weights } });
    await expect(adopt(lead, weightsAlone)).rejects.toMatchObject({ code: 'study-locked' });
    await put(lead, { archivedAt: new Date() });
    await expect(adopt(lead, kept)).rejects.toMatchObject({ code: 'study-archived' });
    expect((await studyRow(lead)).revision).toBe(revision);
    expect(await linesOf(lead)).toHaveLength(lines);
    const criteria = await readCriteria(db, { studyId: lead.studyId });
    expect(criteria.find(({ id }) => id === cost)?.limit).toEqual({ kind: 'at-most', value: 390 });
  });
});

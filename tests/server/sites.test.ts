import { eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { SiteInput, type SitePatch } from '#contract/site.ts';
import { newId } from '#db/columns.ts';
import { user } from '#db/schema/auth.ts';
import { criterion } from '#db/schema/criterion.ts';
import { record } from '#db/schema/record.ts';
import { study } from '#db/schema/study.ts';
import type { AppError } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { addSite } from '#server/sites/add-site.ts';
import { changeSite } from '#server/sites/change-site.ts';
import { readSite, readSites } from '#server/sites/read-sites.ts';
import { removeSites } from '#server/sites/remove-sites.ts';
import { restoreSites } from '#server/sites/restore-sites.ts';
import { testDatabase } from '#tests/support/database.ts';

const { db } = await testDatabase();

/** A study of its own with one engineer in it. */
async function engineer(): Promise<Member> {
  const userId = newId();
  const name = 'Ada Quill';
  await db.insert(user).values({ id: userId, name, email: `${userId}@spinward.test` });
  const [made] = await db
    .insert(study)
    .values({ title: 'Trial', createdBy: userId })
    .returning({ id: study.id });
  if (!made) throw new Error('no study was made');
  return { memberId: newId(), studyId: made.id, userId, name, role: 'engineer' };
}

const draft = (fields: Partial<Parameters<typeof SiteInput.parse>[0] & object> = {}) =>
  SiteInput.parse({ name: 'Tern Head', latitudeDeg: -14.9731, longitudeDeg: 145.3318, ...fields });

const revisionOf = async ({ studyId }: Member) =>
  (await db.select({ revision: study.revision }).from(study).where(eq(study.id, studyId)))[0]?.revision;

describe('sites of a study', () => {
  test('a site without a code gets one, moves the revision and is recorded', async () => {
    const member = await engineer();
    const made = await addSite(db, { member, input: draft() });
    expect(made).toMatchObject({
      code: 'TH',
      version: 1,
      revision: 2,
      elevationM: 0,
      permittedAzimuthsDeg: [],
    });
    const lines = await db.select().from(record).where(eq(record.objectId, made.id));
    expect(lines).toMatchObject([{ action: 'add', revision: 2, userId: member.userId }]);
    expect(
      await readSites(db, { studyId: member.studyId, query: 'tern', page: 1, pageSize: 50 }),
    ).toMatchObject({
      total: 1,
    });
  });

  test('a name or a code is taken once, whatever its case and spacing', async () => {
    const member = await engineer();
    await addSite(db, { member, input: draft({ code: 'es', name: 'Essery Bank' }) });
    await expect(addSite(db, { member, input: draft({ name: ' ESSERY  bank' }) })).rejects.toMatchObject({
      code: 'invalid',
      errors: [{ path: 'name' }],
    });
    await expect(addSite(db, { member, input: draft({ code: 'ES' }) })).rejects.toMatchObject({
      errors: [{ path: 'code', message: 'Code ES is taken by Essery Bank. Give this site another code.' }],
    });
    expect(await revisionOf(member)).toBe(2);
  });

  test('a change moves the version, and the record holds what differs', async () => {
    const member = await engineer();
    const made = await addSite(db, { member, input: draft() });
    const patch = { latitudeDeg: -15, name: made.name };
    const changed = await changeSite(db, { member, siteId: made.id, version: 1, patch });
    expect(changed).toMatchObject({ latitudeDeg: -15, version: 2, revision: 3 });
    const lines = await db.select().from(record).where(eq(record.objectId, made.id));
    expect(lines.at(-1)).toMatchObject({ from: { latitudeDeg: -14.9731 }, to: { latitudeDeg: -15 } });
  });

  test('a change to the same moves nothing', async () => {
    const member = await engineer();
    const made = await addSite(db, { member, input: draft() });
    const same = await changeSite(db, { member, siteId: made.id, version: 1, patch: { elevationM: 0 } });
    expect(same).toMatchObject({ version: 1, revision: 2 });
  });

  test('a stale change is refused with the site as it is and who changed it', async () => {
    const member = await engineer();
    const made = await addSite(db, { member, input: draft() });
    await changeSite(db, { member, siteId: made.id, version: 1, patch: { elevationM: 31 } });
    const late = changeSite(db, { member, siteId: made.id, version: 1, patch: { elevationM: 12 } });
    await expect(late).rejects.toMatchObject({
      code: 'stale',
      status: 409,
      current: { elevationM: 31, version: 2, changedBy: 'Ada Quill' },
    });
  });

  describe('what is known of a figure', () => {
    /** A site with 268 launch days, a rating, a text and a computed criterion beside. */
    async function figured() {
      const member = await engineer();
      const common = { studyId: member.studyId, direction: 'less' as const };
      const named = (position: number, name: string) => ({ ...common, position, name, nameKey: name });
      const steps = { ratingSteps: ['a', 'b', 'c', 'd', 'e'] };
      const made = await db
        .insert(criterion)
        .values([
          { ...named(0, 'Launch days'), source: 'entered' },
          { ...named(1, 'Standing'), source: 'rating', ...steps },
          { ...named(2, 'Sea access'), source: 'text' },
          { ...named(3, 'Turn'), source: 'computed', quantity: 'turn' },
        ])
        .returning({ id: criterion.id });
      const [days = '', rating = '', text = '', computed = ''] = made.map(({ id }) => id);
      const site = await addSite(db, {
        member,
        input: draft({
          values: { [days]: 268, [rating]: 3, [text]: 'quay' },
          particulars: { [days]: { low: 240, high: 280, source: ' Port office ', date: '2026-05-01' } },
        }),
      });
      const change = (patch: Omit<SitePatch, 'version'>, version = 1) =>
        changeSite(db, { member, siteId: site.id, version, patch });
      return { member, site, days, rating, text, computed, change };
    }

    test('is kept as sent, replaced whole, recorded, and goes with its figure', async () => {
      const { site, days, change } = await figured();
      const known = { low: 240, high: 280, source: 'Port office', date: '2026-05-01' };
      expect(site.particulars).toEqual({ [days]: known });
      const same = { date: '2026-05-01', source: 'Port office', high: 280, low: 240 };
      expect((await change({ particulars: { [days]: same } })).version).toBe(1);
      const less = await change({ particulars: { [days]: { low: 250, source: '', confidence: 'high' } } });
      expect(less.particulars).toEqual({ [days]: { low: 250, confidence: 'high' } });
      const lines = await db.select().from(record).where(eq(record.objectId, site.id));
      expect(lines.at(-1)).toMatchObject({
        from: { particulars: { [days]: known } },
        to: { particulars: { [days]: { low: 250, confidence: 'high' } } },
      });
      const gone = await change({ values: { [days]: null } }, 2);
      expect([gone.values[days], gone.particulars]).toEqual([undefined, {}]);
    });

    test('null and nothing at all take it away and leave the figure', async () => {
      const { days, change } = await figured();
      const emptied = await change({ particulars: { [days]: {} } });
      expect([emptied.values[days], emptied.particulars]).toEqual([268, {}]);
      await change({ particulars: { [days]: { low: 1 } } }, 2);
      expect((await change({ particulars: { [days]: null } }, 3)).particulars).toEqual({});
    });

    test('holds the figure between low and high, and a rating on its steps', async () => {
      const { days, rating, change } = await figured();
      const errorsOf = (patch: Omit<SitePatch, 'version'>) =>
        change(patch).then(
          () => [],
          (error: unknown) => (error as AppError).errors,
        );
      expect(await errorsOf({ values: { [days]: 300 } })).toEqual([
        { path: `values.${days}`, message: 'High 280 is below the figure, 300.' },
      ]);
      expect(await errorsOf({ particulars: { [days]: { low: 270, high: 267 } } })).toEqual([
        { path: `particulars.${days}.low`, message: 'Low 270 is above the figure, 268.' },
        { path: `particulars.${days}.high`, message: 'High 267 is below the figure, 268.' },
      ]);
      expect(await errorsOf({ values: { [rating]: 2.5 } })).toMatchObject([{ path: `values.${rating}` }]);
      expect(await errorsOf({ values: { [rating]: 5 } })).toMatchObject([{ path: `values.${rating}` }]);
      expect(await errorsOf({ particulars: { [rating]: { low: -1, high: 3.5 } } })).toMatchObject([
        { path: `particulars.${rating}.low` },
        { path: `particulars.${rating}.high` },
      ]);
      expect(await errorsOf({ particulars: { [rating]: { low: 3, high: 4 } } })).toEqual([]);
    });

    test('needs a figure under an entered criterion or a rating', async () => {
      const { text, computed, days, member, change } = await figured();
      for (const id of [text, computed, newId()])
        await expect(change({ particulars: { [id]: { source: 'x' } } })).rejects.toMatchObject({
          status: 422,
          errors: [{ path: `particulars.${id}` }],
        });
      const known = { [days]: { source: 'x' } };
      await expect(change({ values: { [days]: null }, particulars: known })).rejects.toMatchObject({
        status: 422,
      });
      const input = draft({ name: 'Other', particulars: known });
      await expect(addSite(db, { member, input })).rejects.toMatchObject({
        errors: [{ path: `particulars.${days}`, message: expect.stringContaining('no figure') as string }],
      });
    });
  });

  test('figures are for entered criteria of the study, of their kind; null takes one away', async () => {
    const member = await engineer();
    const common = { studyId: member.studyId, direction: 'less' as const };
    const [days, sea] = await db
      .insert(criterion)
      .values([
        { ...common, position: 0, name: 'Launch days', nameKey: 'launch days', source: 'entered' },
        { ...common, position: 1, name: 'Sea access', nameKey: 'sea access', source: 'text' },
      ])
      .returning({ id: criterion.id });
    if (!days || !sea) throw new Error('no criteria were made');
    const made = await addSite(db, {
      member,
      input: draft({ values: { [days.id]: 268, [sea.id]: 'quay' } }),
    });
    const change = (values: Record<string, number | string | null>) =>
      changeSite(db, { member, siteId: made.id, version: 1, patch: { values } });
    await expect(change({ [days.id]: 'many' })).rejects.toMatchObject({ code: 'invalid' });
    await expect(change({ [newId()]: 1 })).rejects.toMatchObject({ code: 'invalid' });
    expect((await change({ [days.id]: null })).values).toEqual({ [sea.id]: 'quay' });
  });

  test('sites are removed all or none, count nowhere and come back', async () => {
    const member = await engineer();
    const one = await addSite(db, { member, input: draft() });
    const two = await addSite(db, { member, input: draft({ name: 'Skarvnes', latitudeDeg: 70.3 }) });
    const both = [one, two].map(({ id, version }) => ({ id, version }));
    const stale = {
      sites: [
        { id: one.id, version: 1 },
        { id: two.id, version: 9 },
      ],
    };
    await expect(removeSites(db, { member, removal: stale })).rejects.toMatchObject({ code: 'stale' });
    await removeSites(db, { member, removal: { sites: both } });
    await expect(readSite(db, { studyId: member.studyId, siteId: one.id })).rejects.toMatchObject({
      status: 404,
    });
    const back = await restoreSites(db, { member, siteIds: [one.id, two.id] });
    expect(back.items.map(({ version }) => version)).toEqual([3, 3]);
    expect(await revisionOf(member)).toBe(5);
  });

  test('a removed site whose code went to another does not come back', async () => {
    const member = await engineer();
    const one = await addSite(db, { member, input: draft() });
    await removeSites(db, { member, removal: { sites: [{ id: one.id, version: 1 }] } });
    await addSite(db, { member, input: draft({ code: 'TH', name: 'Another' }) });
    await expect(restoreSites(db, { member, siteIds: [one.id] })).rejects.toMatchObject({ code: 'conflict' });
  });

  test('another study’s site is not there, and in review nothing moves', async () => {
    const member = await engineer();
    const stranger = await engineer();
    const made = await addSite(db, { member, input: draft() });
    const patch = { notes: 'x' };
    await expect(
      changeSite(db, { member: stranger, siteId: made.id, version: 1, patch }),
    ).rejects.toMatchObject({ code: 'not-found' });
    await db.update(study).set({ state: 'in-review' }).where(eq(study.id, member.studyId));
    await expect(changeSite(db, { member, siteId: made.id, version: 1, patch })).rejects.toMatchObject({
      code: 'study-locked',
    });
  });
});

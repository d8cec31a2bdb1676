import { readFileSync } from 'node:fs';
import { eq, sql } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { CriterionInput } from '#contract/criterion.ts';
import { SiteInput } from '#contract/site.ts';
import type { UploadCommit, UploadPreview } from '#contract/upload.ts';
import { record } from '#db/schema/record.ts';
import { site, upload } from '#db/schema/site.ts';
import { study } from '#db/schema/study.ts';
import { addCriterion } from '#server/criteria/add-criterion.ts';
import { AppError } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { addSite } from '#server/sites/add-site.ts';
import { changeSite } from '#server/sites/change-site.ts';
import { exportCsv } from '#server/sites/export-csv.ts';
import { exportGeoJson } from '#server/sites/export-geojson.ts';
import { removeSites } from '#server/sites/remove-sites.ts';
import { commitUpload } from '#server/uploads/commit-upload.ts';
import { previewUpload } from '#server/uploads/preview-upload.ts';
import { readPostedFile } from '#server/uploads/read-form.ts';
import { readUpload, readUploadedFile, readUploads } from '#server/uploads/read-uploads.ts';
import { undoUpload } from '#server/uploads/undo-upload.ts';
import { testDatabase } from '#tests/support/database.ts';
import { studyWith } from '#tests/support/study.ts';
import { expectSoon } from '#tests/support/soon.ts';

const { db } = await testDatabase();

const seedFile = (name: string) => readFileSync(new URL(`../../seed/${name}`, import.meta.url));

function posting(
  file: string | Uint8Array<ArrayBuffer>,
  fields: Record<string, string> = {},
  name = 'sites.csv',
): Request {
  const form = new FormData();
  form.set('file', new File([file], name));
  for (const [key, value] of Object.entries(fields)) form.set(key, value);
  return new Request('http://localhost/uploads', { method: 'POST', body: form });
}

async function preview(member: Member, ...post: Parameters<typeof posting>): Promise<UploadPreview> {
  return previewUpload(db, { member, posted: await readPostedFile(posting(...post)) });
}

const commit = (member: Member, { uploadId }: { uploadId: string }, what: Partial<UploadCommit> = {}) =>
  commitUpload(db, { member, uploadId, commit: { lines: 'accepted', duplicates: 'skip', ...what } });

async function sitesOf({ studyId }: Member) {
  const rows = await db.select().from(site).where(eq(site.studyId, studyId));
  return rows.filter((row) => row.deletedAt === null).sort((a, b) => (a.id < b.id ? -1 : 1));
}

async function faultOf(promise: Promise<unknown>): Promise<AppError> {
  try {
    await promise;
  } catch (error) {
    if (error instanceof AppError) return error;
    throw error;
  }
  throw new Error('nothing was refused');
}

const essery = SiteInput.parse({
  code: 'ES',
  name: 'Essery Bank',
  latitudeDeg: 7.33,
  longitudeDeg: -58.5,
  elevationM: 6,
});

describe('preview', () => {
  test('reads the demo’s file with errors and writes nothing to the sites', async () => {
    const member = await studyWith(db, 'engineer');
    await addSite(db, { member, input: essery });
    const read = await preview(member, new Uint8Array(seedFile('candidates-with-errors.csv')));
    expect(read.counts).toEqual({ new: 9, duplicate: 0, refused: 3 });
    expect(read.rows.filter((row) => row.outcome === 'refused').map((row) => row.line)).toEqual([5, 8, 11]);
    expect(await sitesOf(member)).toHaveLength(1);
    const [row] = await db
      .select({ revision: study.revision })
      .from(study)
      .where(eq(study.id, member.studyId));
    expect(row?.revision).toBe(2);
  });

  test('columns, separator and encoding can be posted', async () => {
    const member = await studyWith(db, 'lead');
    const text = 'ort|x;a;b\nGr\u00e5skj\u00e6r;1,5;2,5\n';
    const bytes = Uint8Array.from([...text].map((c) => c.charCodeAt(0)));
    const columns = JSON.stringify({ 'ort|x': 'name', A: 'latitude', b: 'lon' });
    const read = await preview(member, bytes, { columns, delimiter: 'semicolon', encoding: 'windows-1252' });
    expect(read.rows[0]?.site).toMatchObject({ name: 'Gråskjær', latitudeDeg: 1.5, longitudeDeg: 2.5 });
    await commit(member, read);
    expect(await sitesOf(member)).toMatchObject([{ name: 'Gråskjær', latitudeDeg: 1.5 }]);
  });

  test.each([
    ['', 422, 'file'],
    ['a\0b\0\0', 422, 'file'],
    ['A,1,2\n', 422, 'file'],
    [`name,lat,lon\n${'A,1,2\n'.repeat(10_001)}`, 422, 'file'],
    ['x'.repeat(5 * 1024 * 1024 + 1), 413, 'file'],
    ['x'.repeat(6 * 1024 * 1024), 413, undefined],
  ])('a file that cannot be read is not kept (%#)', async (file, status, path) => {
    const member = await studyWith(db, 'engineer');
    const fault = await faultOf(preview(member, file));
    expect(fault.status).toBe(status);
    if (status === 422) expect(fault.errors?.[0]?.path).toBe(path);
    expect(await db.select().from(upload).where(eq(upload.studyId, member.studyId))).toEqual([]);
  });

  test('a form without a file, and no form at all, are refused', async () => {
    const form = new FormData();
    form.set('data', 'x');
    const post = (body: BodyInit) =>
      readPostedFile(new Request('http://localhost/', { method: 'POST', body }));
    expect((await faultOf(post(form))).errors?.[0]?.path).toBe('file');
    expect((await faultOf(post('name,lat,lon'))).errors?.[0]?.path).toBe('file');
    await expect(readPostedFile(posting('name,lat,lon\nA,1,2', { delimiter: '#' }))).rejects.toThrow(
      'none of',
    );
  });

  test('a study in review takes no file', async () => {
    const member = await studyWith(db, 'engineer', { state: 'in-review' });
    expect((await faultOf(preview(member, 'name,lat,lon\nA,1,2\n'))).code).toBe('study-locked');
  });
});

describe('commit', () => {
  test('adds the accepted rows in order, makes criteria once, moves the revision once and records each', async () => {
    const member = await studyWith(db, 'engineer');
    const read = await preview(member, new Uint8Array(seedFile('candidates-clean.csv')));
    const done = await commit(member, read);
    expect(done).toMatchObject({ added: 10, updated: 0, skipped: 0, revision: 2 });
    const rows = await sitesOf(member);
    expect(rows.map((row) => row.code)).toEqual(['PS', 'TA', 'CL', 'KF', 'IT', 'IR', 'KB', 'CW', 'YH', 'ML']);
    expect(rows[1]).toMatchObject({
      longitudeDeg: -175.14,
      permittedAzimuthsDeg: [],
      version: 1,
      uploadId: read.uploadId,
    });
    expect(Object.values(rows[0]?.values ?? {})).toEqual(expect.arrayContaining([48, 338, 51, 271, 3]));
    const lines = await db.select().from(record).where(eq(record.studyId, member.studyId));
    expect(lines.map((line) => line.object).sort()).toEqual([
      ...Array<string>(5).fill('criterion'),
      ...Array<string>(10).fill('site'),
    ]);
    const again = await preview(member, 'name,lat,lon,cost to first launch [m€]\nZ,1,2,9\n');
    expect(again.columns[3]).toMatchObject({
      criterion: 'Cost to first launch',
      criterionId: expect.any(String) as string,
    });
  });

  test('chosen lines alone; a refused or unknown one refuses the whole', async () => {
    const member = await studyWith(db, 'engineer');
    const read = await preview(member, 'name,lat,lon\nA,1,2\nB,100,2\nC,11,12\n');
    const fault = await faultOf(commit(member, read, { lines: [2, 3, 9] }));
    expect(fault.status).toBe(422);
    expect(fault.errors).toEqual([
      { path: 'lines.1', message: 'Line 3 is refused. Latitude 100 is outside −90 to 90.' },
      { path: 'lines.2', message: 'No row begins on line 9.' },
    ]);
    expect(await sitesOf(member)).toEqual([]);
    expect(await commit(member, read, { lines: [4] })).toMatchObject({
      added: 1,
      sites: [{ line: 4, action: 'add' }],
    });
    expect((await faultOf(commit(member, read))).status).toBe(409);
  });

  test('what was taken since the preview is refused at the commit too', async () => {
    const member = await studyWith(db, 'engineer');
    const read = await preview(member, 'name,code,lat,lon\nEssery Quay,ES,1,2\n');
    await addSite(db, { member, input: essery });
    expect((await faultOf(commit(member, read, { lines: [2] }))).errors?.[0]?.message).toContain(
      'Code ES is taken by Essery Bank',
    );
    expect(await commit(member, read)).toMatchObject({ added: 0 });
  });

  describe('duplicates', () => {
    const file = 'name,code,lat,lon,notes,Cost\nessery bank,EB,8,-59,moved,12\nNew,,20,20,,\n';

    test('skip leaves the site as it was', async () => {
      const member = await studyWith(db, 'engineer');
      await addSite(db, { member, input: essery });
      expect(await commit(member, await preview(member, file))).toMatchObject({
        added: 1,
        updated: 0,
        skipped: 1,
      });
      expect((await sitesOf(member))[0]).toMatchObject({ code: 'ES', version: 1 });
    });

    test('update writes the file’s columns and leaves the others; the same again changes nothing', async () => {
      const member = await studyWith(db, 'engineer');
      await addSite(db, { member, input: essery });
      expect(await commit(member, await preview(member, file), { duplicates: 'update' })).toMatchObject({
        added: 1,
        updated: 1,
      });
      const [updated] = await sitesOf(member);
      expect(updated).toMatchObject({
        code: 'EB',
        name: 'essery bank',
        latitudeDeg: 8,
        elevationM: 6,
        notes: 'moved',
        version: 2,
      });
      expect(Object.values(updated?.values ?? {})).toEqual([12]);
      const again = await commit(member, await preview(member, file), { duplicates: 'update' });
      expect(again).toMatchObject({ added: 0, updated: 0, skipped: 2 });
      const lines = await db
        .select()
        .from(record)
        .where(eq(record.objectId, updated?.id ?? ''));
      expect(lines.at(-1)).toMatchObject({
        action: 'change',
        from: { code: 'ES', notes: '' },
        to: { code: 'EB', notes: 'moved' },
      });
    });

    test('add gives a fresh code and appends (2), then (3)', async () => {
      const member = await studyWith(db, 'engineer');
      await addSite(db, { member, input: essery });
      await commit(member, await preview(member, 'name,code,lat,lon\nEssery Bank,ES,8,-59\n'), {
        duplicates: 'add',
      });
      await commit(member, await preview(member, 'name,lat,lon\nEssery Bank,9,-59\n'), { duplicates: 'add' });
      const rows = await sitesOf(member);
      expect(rows.map((row) => row.name)).toEqual(['Essery Bank', 'Essery Bank (2)', 'Essery Bank (3)']);
      expect(new Set(rows.map((row) => row.code)).size).toBe(3);
    });
  });
});

describe('low and high', () => {
  const idOf = async (member: Member) => Object.keys((await sitesOf(member))[0]?.values ?? {})[0] ?? '';

  test('are committed, written over, and come back with an undo; what the file has no column for stays', async () => {
    const member = await studyWith(db, 'engineer');
    const read = await preview(member, 'name,lat,lon,Cost,Cost_low,Cost_high\nEssery Bank,8,-59,12,10,15\n');
    expect(read.rows[0]?.site.particulars).toEqual({ Cost: { low: 10, high: 15 } });
    await commit(member, read);
    const [made] = await sitesOf(member);
    if (!made) throw new Error('no site');
    const id = await idOf(member);
    expect(made.particulars).toEqual({ [id]: { low: 10, high: 15 } });
    const known = { low: 10, high: 15, source: 'Port office' };
    await changeSite(db, { member, siteId: made.id, version: 1, patch: { particulars: { [id]: known } } });

    const lower = await preview(member, 'name,lat,lon,Cost,cost low\nEssery Bank,8,-59,13,\n');
    await commit(member, lower, { duplicates: 'update' });
    expect((await sitesOf(member))[0]).toMatchObject({ values: { [id]: 13 } });
    expect((await sitesOf(member))[0]?.particulars).toEqual({ [id]: { high: 15, source: 'Port office' } });
    await undoUpload(db, { member, uploadId: lower.uploadId });
    expect((await sitesOf(member))[0]).toMatchObject({ values: { [id]: 12 }, particulars: { [id]: known } });

    const gone = await preview(member, 'name,lat,lon,Cost\nEssery Bank,8,-59,\n');
    await commit(member, gone, { duplicates: 'update' });
    expect((await sitesOf(member))[0]).toMatchObject({ values: {}, particulars: {} });
  });

  test('an update that would leave a low or high behind is refused whole', async () => {
    const member = await studyWith(db, 'engineer');
    await commit(member, await preview(member, 'name,lat,lon,Cost,Cost_low\nEssery Bank,8,-59,12,10\n'));
    const read = await preview(member, 'name,lat,lon,Cost\nEssery Bank,8,-59,9\nNew,20,20,1\n');
    const fault = await faultOf(commit(member, read, { duplicates: 'update' }));
    expect(fault).toMatchObject({
      status: 422,
      errors: [{ path: 'lines', message: 'Line 2, Cost: Low 10 is above the figure, 9.' }],
    });
    expect(await sitesOf(member)).toMatchObject([{ values: { [await idOf(member)]: 12 } }]);
    expect(await commit(member, read)).toMatchObject({ added: 1, skipped: 1 });
  });

  test('a rating’s column gives its steps; sites.csv written over the study changes nothing', async () => {
    const member = await studyWith(db, 'engineer');
    const rating = await addCriterion(db, {
      member,
      input: CriterionInput.parse({ source: 'rating', name: 'Standing' }),
    });
    await commit(
      member,
      await preview(member, 'name,lat,lon,Standing,Standing_high\nA,1,2,poor,Good\nB,9,9,4,\n'),
    );
    expect((await sitesOf(member)).map(({ values, particulars }) => [values, particulars])).toEqual([
      [{ [rating.id]: 1 }, { [rating.id]: { high: 3 } }],
      [{ [rating.id]: 4 }, {}],
    ]);
    const again = await preview(member, await (await exportCsv(db, member)).text());
    expect(again.counts).toEqual({ new: 0, duplicate: 2, refused: 0 });
    expect(await commit(member, again, { duplicates: 'update' })).toMatchObject({ updated: 0, skipped: 2 });
  });
});

describe('undo', () => {
  test('removes what was added, restores what was updated and drops the criteria it made', async () => {
    const member = await studyWith(db, 'engineer');
    const before = await addSite(db, { member, input: essery });
    const read = await preview(member, 'name,lat,lon,Cost\nEssery Bank,8,-59,12\nNew,20,20,13\n');
    await commit(member, read, { duplicates: 'update' });
    const undone = await undoUpload(db, { member, uploadId: read.uploadId });
    expect(undone).toMatchObject({ removed: 1, restored: 1, revision: 4 });
    expect(await sitesOf(member)).toMatchObject([
      { id: before.id, latitudeDeg: 7.33, values: {}, version: 3 },
    ]);
    expect((await preview(member, 'name,lat,lon,Cost\nX,1,1,1\n')).columns[3]?.criterionId).toBeNull();
    expect((await faultOf(undoUpload(db, { member, uploadId: read.uploadId }))).status).toBe(409);
  });

  test('undoes a commit that was made before figures had particulars', async () => {
    const member = await studyWith(db, 'engineer');
    await addSite(db, { member, input: essery });
    const read = await preview(member, 'name,lat,lon,Cost\nEssery Bank,8,-59,12\n');
    await commit(member, read, { duplicates: 'update' });
    await db
      .update(upload)
      .set({ effect: sql`${upload.effect} #- '{updated,0,before,particulars}'` })
      .where(eq(upload.id, read.uploadId));
    await undoUpload(db, { member, uploadId: read.uploadId });
    expect(await sitesOf(member)).toMatchObject([{ latitudeDeg: 7.33, values: {}, particulars: {} }]);
  });

  test('409 after a site of it was edited, added or updated, and after one was removed', async () => {
    for (const touch of ['edit-added', 'edit-updated', 'remove'] as const) {
      const member = await studyWith(db, 'engineer');
      await addSite(db, { member, input: essery });
      const read = await preview(member, 'name,lat,lon\nEssery Bank,8,-59\nNew,20,20\n');
      await commit(member, read, { duplicates: 'update' });
      const [updated, added] = await sitesOf(member);
      const target = touch === 'edit-updated' ? updated : added;
      if (!target) throw new Error('no site');
      const { id, version } = target;
      if (touch === 'remove') await removeSites(db, { member, removal: { sites: [{ id, version }] } });
      else await changeSite(db, { member, siteId: id, version, patch: { notes: 'edited' } });
      const fault = await faultOf(undoUpload(db, { member, uploadId: read.uploadId }));
      expect([touch, fault.status]).toEqual([touch, 409]);
      expect((await sitesOf(member))[0]?.latitudeDeg).toBe(8);
    }
  });

  test('409 where another site has taken the code that the update freed', async () => {
    const member = await studyWith(db, 'engineer');
    await addSite(db, { member, input: essery });
    const read = await preview(member, 'name,code,lat,lon\nEssery Bank,EB,8,-59\n');
    await commit(member, read, { duplicates: 'update' });
    await addSite(db, { member, input: { ...essery, name: 'Essery Quay' } });
    expect((await faultOf(undoUpload(db, { member, uploadId: read.uploadId }))).message).toContain(
      'Essery Quay has its code or name now',
    );
  });
});

describe('what is kept and given back', () => {
  test('the original bytes under their name, and a list with what became of each', async () => {
    const member = await studyWith(db, 'engineer');
    const bytes = new Uint8Array(seedFile('candidates-with-errors.csv'));
    const read = await preview(member, bytes, {}, 'Küste (2).csv');
    const file = await readUploadedFile(db, { studyId: member.studyId, uploadId: read.uploadId });
    expect(new Uint8Array(await file.arrayBuffer())).toEqual(bytes);
    // RFC 5987 by hand: ü is C3 BC in UTF-8, brackets are not attr-char.
    expect(file.headers.get('content-disposition')).toBe(
      "attachment; filename*=UTF-8''K%C3%BCste%20%282%29.csv",
    );
    await commit(member, read);
    const { items, total } = await readUploads(db, {
      studyId: member.studyId,
      query: 'küste',
      page: 1,
      pageSize: 50,
    });
    expect([total, items[0]]).toEqual([
      1,
      await readUpload(db, { studyId: member.studyId, uploadId: read.uploadId }),
    ]);
    expect(items[0]).toMatchObject({
      state: 'committed',
      added: 10,
      updated: 0,
      byteLength: bytes.length,
      undoneAt: null,
    });
  });

  test('an upload of one study is none of another', async () => {
    const member = await studyWith(db, 'engineer');
    const other = await studyWith(db, 'lead');
    const { uploadId } = await preview(member, 'name,lat,lon\nA,1,2\n');
    expect((await faultOf(commit(other, { uploadId }))).status).toBe(404);
    expect((await faultOf(undoUpload(db, { member: other, uploadId }))).status).toBe(404);
    expect((await faultOf(readUploadedFile(db, { studyId: other.studyId, uploadId }))).status).toBe(404);
  });
});

describe('exports', () => {
  test('sites.csv goes into another study and comes out the same', async () => {
    const from = await studyWith(db, 'engineer');
    const to = await studyWith(db, 'engineer');
    await commit(from, await preview(from, new Uint8Array(seedFile('candidates-500.csv'))));
    await addSite(db, {
      member: from,
      input: SiteInput.parse({ name: '=1+1', latitudeDeg: -1, longitudeDeg: 180, notes: '-a\n"b"' }),
    });
    await commit(
      from,
      await preview(from, 'name,lat,lon,Nearest port (km),Nearest port_low (km)\nPort,3,3,7.5,0.25\n'),
    );
    const text = await (await exportCsv(db, from)).text();
    expect(text.split('\r\n')[0]).toMatch(
      /^code,name,latitude_deg,longitude_deg,elevation_m,permitted_azimuths,notes,Nearest port \(km\),Nearest port_low \(km\),Nearest port_high \(km\)/,
    );
    const read = await preview(to, text);
    expect(read.counts).toEqual({ new: 502, duplicate: 0, refused: 0 });
    await commit(to, read);
    expect(await (await exportCsv(db, to)).text()).toBe(text);
  });

  // RFC 7946, sections 3.1.1 and 4: longitude, latitude, then height over the ellipsoid in metres.
  test('sites.geojson', async () => {
    const member = await studyWith(db, 'engineer');
    const cost = await addCriterion(db, {
      member,
      input: CriterionInput.parse({ source: 'entered', name: 'Cost', direction: 'less' }),
    });
    const particulars = { [cost.id]: { low: 10, source: 'Port office' } };
    await addSite(db, { member, input: { ...essery, values: { [cost.id]: 12 }, particulars } });
    expect(await (await exportGeoJson(db, member)).json()).toMatchObject({
      type: 'FeatureCollection',
      features: [
        {
          type: 'Feature',
          geometry: { type: 'Point', coordinates: [-58.5, 7.33, 6] },
          properties: {
            code: 'ES',
            values: { Cost: 12 },
            particulars: { Cost: { low: 10, source: 'Port office' } },
          },
        },
      ],
    });
  });
});

test('10,000 rows: preview under 3 s, commit under 5 s, undo too', async () => {
  const member = await studyWith(db, 'engineer');
  const rows = Array.from(
    { length: 10_000 },
    (_, i) => `Site ${i},${(i % 1700) / 10 - 85},${(i * 7) % 360},12,35-120; 200-250,note,${i}`,
  );
  const started = performance.now();
  const read = await preview(member, `name,lat,lon,elev,azimuths,notes,Cost\n${rows.join('\n')}\n`);
  const previewed = performance.now();
  expect(await commit(member, read)).toMatchObject({ added: 10_000 });
  const committed = performance.now();
  await undoUpload(db, { member, uploadId: read.uploadId });
  const undone = performance.now();
  expectSoon('preview of 10,000 rows', previewed - started, 3_000);
  expectSoon('commit of 10,000 rows', committed - previewed, 5_000);
  expectSoon('undo of 10,000 rows', undone - committed, 5_000);
});

import { createHash } from 'node:crypto';
import { deflateSync, crc32 } from 'node:zlib';
import { eq } from 'drizzle-orm';
import { describe, expect, test } from 'vitest';
import { CriterionInput } from '#contract/criterion.ts';
import { MAX_EVIDENCE_BYTES, MOST_FILES } from '#contract/evidence.ts';
import { SiteInput } from '#contract/site.ts';
import { newId } from '#db/columns.ts';
import { record } from '#db/schema/record.ts';
import { evidence } from '#db/schema/site.ts';
import { decide, ruleOf } from '#server/access.ts';
import { addCriterion } from '#server/criteria/add-criterion.ts';
import { AppError } from '#server/errors.ts';
import { addEvidence } from '#server/evidence/add-evidence.ts';
import { kindOfFile } from '#server/evidence/kind-of-file.ts';
import { readEvidence, readEvidenceFile } from '#server/evidence/read-evidence.ts';
import { readPostedEvidence } from '#server/evidence/read-form.ts';
import { removeEvidence } from '#server/evidence/remove-evidence.ts';
import type { Member } from '#server/member.ts';
import { readFigures } from '#server/ranking/read-ranking.ts';
import { addSite } from '#server/sites/add-site.ts';
import { removeSites } from '#server/sites/remove-sites.ts';
import { testDatabase } from '#tests/support/database.ts';
import { studyWith } from '#tests/support/study.ts';

const { db } = await testDatabase();

const text = (content: string) => new TextEncoder().encode(content);

/** A picture of one black point by the PNG specification (W3C, third edition), sections 5.2, 5.3 and 11.2 [from memory]. */
function png(): Uint8Array<ArrayBuffer> {
  const chunk = (type: string, data: Uint8Array) => {
    const body = Buffer.concat([Buffer.from(type, 'latin1'), data]);
    const frame = Buffer.alloc(8);
    frame.writeUInt32BE(data.length, 0);
    frame.writeUInt32BE(crc32(body), 4);
    return Buffer.concat([frame.subarray(0, 4), body, frame.subarray(4)]);
  };
  const header = Buffer.from([0, 0, 0, 1, 0, 0, 0, 1, 8, 0, 0, 0, 0]);
  const signature = Buffer.from('89504e470d0a1a0a', 'hex');
  const parts = [
    chunk('IHDR', header),
    chunk('IDAT', deflateSync(Buffer.from([0, 0]))),
    chunk('IEND', Buffer.alloc(0)),
  ];
  return new Uint8Array(Buffer.concat([signature, ...parts]));
}

const PDF = text('%PDF-1.7\n1 0 obj\n<< /Type /Catalog >>\nendobj\n%%EOF\n');

/** A study with one site that has a cost, a rating yet to be made and a computed figure. */
async function figured(role: 'engineer' | 'lead' = 'engineer') {
  const member = await studyWith(db, role);
  const add = (input: object) => addCriterion(db, { member, input: CriterionInput.parse(input) });
  const cost = await add({ source: 'entered', name: 'Cost', direction: 'less' });
  const rating = await add({ source: 'rating', name: 'Standing' });
  const computed = await add({ source: 'computed', quantity: 'lowest-inclination' });
  const input = SiteInput.parse({
    name: 'Essery Bank',
    latitudeDeg: 7,
    longitudeDeg: -58,
    values: { [cost.id]: 12 },
  });
  const site = await addSite(db, { member, input });
  return { member, site, cost, rating, computed };
}

function posting(file: BlobPart, name: string, fields: Record<string, string>, type = ''): Request {
  const form = new FormData();
  form.set('file', new File([file], name, { type }));
  for (const [key, value] of Object.entries(fields)) form.set(key, value);
  return new Request('http://localhost/evidence', { method: 'POST', body: form });
}

type Figured = Awaited<ReturnType<typeof figured>>;
const figureOf = ({ site, cost }: Figured) => ({ siteId: site.id, criterionId: cost.id });

async function post(member: Member, ...args: Parameters<typeof posting>) {
  return addEvidence(db, { member, posted: await readPostedEvidence(posting(...args)) });
}

const listOf = ({ studyId }: Member, figure: { siteId?: string; criterionId?: string } = {}) =>
  readEvidence(db, { studyId, query: '', page: 1, pageSize: 50, ...figure });

async function faultOf(promise: Promise<unknown>): Promise<AppError> {
  try {
    await promise;
  } catch (error) {
    if (error instanceof AppError) return error;
    throw error;
  }
  throw new Error('nothing was refused');
}

// First bytes by the formats' own specifications: ISO 32000-1 7.5.2, PNG 5.2, ITU-T T.81 B.1.1.3 with JFIF's APP0,
// RFC 9649 2.3 [from memory].
describe('the kind of a file is told from its bytes', () => {
  test.each([
    ['application/pdf', PDF],
    ['image/png', png()],
    ['image/jpeg', Buffer.from('ffd8ffe000104a46494600', 'hex')],
    ['image/webp', Buffer.from('524946461a000000574542505650384c', 'hex')],
    ['text/csv', text('site,cost\nA,12\n')],
    ['text/csv', text('\ufeffsite;cost\r\n"A;1";12\r\n')],
    [undefined, text('<!doctype html><script>alert(1)</script>')],
    [undefined, text('\n\ufeff <svg xmlns="http://www.w3.org/2000/svg" onload="alert(1)"/>\n')],
    [undefined, text('<?xml version="1.0"?><a,b/>\n<a,b/>')],
    [undefined, text(' %PDF-1.7')],
    [undefined, text('a line of prose\nand another, longer')],
    [undefined, text('a,b\n"never closed,1')],
    [undefined, text('')],
    [undefined, Buffer.from('504b0304140000000800', 'hex')],
    [undefined, Buffer.from('4d5a90000300000004000000', 'hex')],
    [undefined, Buffer.from('524946461a00000057415645', 'hex')],
    [undefined, Buffer.from('RIFF')],
  ])('%s (%#)', (kind, bytes) => {
    expect(kindOfFile(new Uint8Array(bytes))).toBe(kind);
  });
});

describe('evidence of a figure', () => {
  test('is kept with its checksum, recorded, counted, listed and given back as it came', async () => {
    const study = await figured();
    const { member, site, cost } = study;
    const bytes = png();
    const made = await post(member, bytes, '../../Küste "1".html', figureOf(study), 'text/html');
    const sha256 = createHash('sha256').update(bytes).digest('hex');
    expect(made).toMatchObject({
      fileName: 'Küste "1".html',
      mediaType: 'image/png',
      byteLength: bytes.length,
      sha256,
      by: 'Ada Quill',
    });
    const { revision, savedAt: _savedAt, ...item } = made;
    expect(await listOf(member)).toEqual({ items: [item], total: 1 });
    expect((await listOf(member, { siteId: newId() })).total).toBe(0);
    expect((await readFigures(db, member)).evidence).toEqual([[0, 0, 1]]);
    const lines = await db.select().from(record).where(eq(record.objectId, made.id));
    expect(lines).toMatchObject([
      { object: 'evidence', action: 'add', revision, to: { sha256, siteId: site.id, criterionId: cost.id } },
    ]);
    const file = await readEvidenceFile(db, { studyId: member.studyId, evidenceId: made.id });
    expect(new Uint8Array(await file.arrayBuffer())).toEqual(bytes);
    expect(Object.fromEntries(file.headers)).toEqual({
      'content-type': 'image/png',
      'content-disposition': "attachment; filename*=UTF-8''K%C3%BCste%20%221%22.html",
      'content-security-policy': "sandbox; default-src 'none'",
      'x-content-type-options': 'nosniff',
      'cache-control': 'private, no-store',
    });
  });

  test('is taken away for everyone, recorded, and its bytes stay', async () => {
    const study = await figured();
    const { member } = study;
    const { id } = await post(member, PDF, 'a.pdf', figureOf(study));
    await removeEvidence(db, { member, evidenceId: id });
    expect((await listOf(member)).total).toBe(0);
    expect((await readFigures(db, member)).evidence).toEqual([]);
    const scope = { studyId: member.studyId, evidenceId: id };
    expect((await faultOf(readEvidenceFile(db, scope))).status).toBe(404);
    expect((await faultOf(removeEvidence(db, { member, evidenceId: id }))).status).toBe(404);
    const lines = await db.select().from(record).where(eq(record.objectId, id));
    expect(lines.map(({ action }) => action)).toEqual(['add', 'remove']);
    const [row] = await db.select().from(evidence).where(eq(evidence.id, id));
    expect(row?.bytes.equals(PDF)).toBe(true);
  });

  test('goes out of sight with its site', async () => {
    const study = await figured();
    const { member, site } = study;
    const { id } = await post(member, PDF, 'a.pdf', figureOf(study));
    await removeSites(db, { member, removal: { sites: [{ id: site.id, version: 1 }] } });
    expect((await listOf(member)).total).toBe(0);
    expect((await faultOf(readEvidenceFile(db, { studyId: member.studyId, evidenceId: id }))).status).toBe(
      404,
    );
  });

  test.each([
    ['page.pdf', '<!doctype html><title>x</title>', 'application/pdf'],
    ['drawing.png', '<svg xmlns="http://www.w3.org/2000/svg"/>', 'image/png'],
    ['notes.csv', 'no table at all', 'text/csv'],
    ['empty.pdf', '', 'application/pdf'],
  ])('%s that is not what it says is refused and not kept', async (name, content, type) => {
    const study = await figured();
    const fault = await faultOf(post(study.member, content, name, figureOf(study), type));
    expect([fault.status, fault.errors?.[0]?.path]).toEqual([422, 'file']);
    expect((await listOf(study.member)).total).toBe(0);
  });

  test('10 MB are taken, one byte more is 413, also where the form is larger than is read at all', async () => {
    const study = await figured();
    const sized = (length: number) => {
      const bytes = new Uint8Array(length);
      bytes.set(PDF);
      return bytes;
    };
    const made = await post(study.member, sized(MAX_EVIDENCE_BYTES), 'a.pdf', figureOf(study));
    expect(made.byteLength).toBe(MAX_EVIDENCE_BYTES);
    for (const length of [MAX_EVIDENCE_BYTES + 1, MAX_EVIDENCE_BYTES + 1024 * 1024]) {
      const fault = await faultOf(post(study.member, sized(length), 'a.pdf', figureOf(study)));
      expect(fault.status).toBe(413);
    }
    expect((await listOf(study.member)).total).toBe(1);
  });

  test('belongs to an entered figure that there is', async () => {
    const study = await figured();
    const { member, site, cost, rating, computed } = study;
    const other = await figured();
    const wrong = [
      [{ siteId: site.id, criterionId: rating.id }, 'criterionId'],
      [{ siteId: site.id, criterionId: computed.id }, 'criterionId'],
      [{ siteId: site.id, criterionId: other.cost.id }, 'criterionId'],
      [{ siteId: other.site.id, criterionId: cost.id }, 'siteId'],
    ] as const;
    for (const [figure, path] of wrong) {
      const fault = await faultOf(post(member, PDF, 'a.pdf', figure));
      expect([fault.status, fault.errors?.[0]?.path]).toEqual([422, path]);
    }
    await expect(post(member, PDF, 'a.pdf', { siteId: site.id })).rejects.toMatchObject({ name: 'ZodError' });
  });

  test('has an end to its files', async () => {
    const study = await figured();
    for (let n = 0; n < MOST_FILES; n += 1) await post(study.member, PDF, `${n}.pdf`, figureOf(study));
    expect((await faultOf(post(study.member, PDF, 'more.pdf', figureOf(study)))).status).toBe(422);
  });

  test('is of one study: a member of another finds nothing', async () => {
    const study = await figured();
    const stranger = await studyWith(db, 'lead');
    const { id } = await post(study.member, PDF, 'a.pdf', figureOf(study));
    expect((await listOf(stranger)).total).toBe(0);
    expect((await faultOf(readEvidenceFile(db, { studyId: stranger.studyId, evidenceId: id }))).status).toBe(
      404,
    );
    expect((await faultOf(removeEvidence(db, { member: stranger, evidenceId: id }))).status).toBe(404);
    expect((await listOf(study.member)).total).toBe(1);
  });

  test('everyone in the study reads it, engineers and leads write it, a stranger gets no answer', () => {
    const actor = { userId: 'a', administrator: true };
    const routes = '/api/v1/studies/[studyId]/evidence';
    const ask = (path: string, verb: string, role: Parameters<typeof decide>[2]) =>
      decide(ruleOf(routes + path, verb), actor, role);
    for (const [path, verb] of [
      ['', 'GET'],
      ['/[evidenceId]/file', 'GET'],
    ] as const) {
      expect([ask(path, verb, 'reader'), ask(path, verb, null)]).toEqual(['allow', 'not-found']);
    }
    for (const [path, verb] of [
      ['', 'POST'],
      ['/[evidenceId]', 'DELETE'],
    ] as const) {
      expect(['engineer', 'reviewer', 'reader', null].map((role) => ask(path, verb, role as never))).toEqual([
        'allow',
        'forbidden',
        'forbidden',
        'not-found',
      ]);
    }
  });

  test('a study in review takes none', async () => {
    const study = await figured();
    const locked = await studyWith(db, 'engineer', { state: 'in-review' });
    expect((await faultOf(post(locked, PDF, 'a.pdf', figureOf(study)))).code).toBe('study-locked');
  });
});

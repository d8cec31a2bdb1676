import { and, asc, count, desc, eq, ilike, inArray, isNull, sql, type SQL } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { newId } from '../columns.ts';
import { user } from '../schema/auth.ts';
import { site, upload } from '../schema/site.ts';
import type { SiteFields, SiteRow } from './site.ts';

export type UploadState = (typeof upload.$inferSelect)['state'];
export type NewUpload = Pick<
  typeof upload.$inferInsert,
  'fileName' | 'bytes' | 'sha256' | 'reading' | 'createdBy'
>;

interface InStudy {
  studyId: string;
}
interface OneUpload extends InStudy {
  uploadId: string;
}

const one = ({ studyId, uploadId }: OneUpload) => and(eq(upload.studyId, studyId), eq(upload.id, uploadId));
const present = (studyId: string) => and(eq(site.studyId, studyId), isNull(site.deletedAt));

const siteColumns = {
  id: site.id,
  studyId: site.studyId,
  code: site.code,
  name: site.name,
  latitudeDeg: site.latitudeDeg,
  longitudeDeg: site.longitudeDeg,
  elevationM: site.elevationM,
  permittedAzimuthsDeg: site.permittedAzimuthsDeg,
  notes: site.notes,
  values: site.values,
  particulars: site.particulars,
  version: site.version,
};

const summaryColumns = {
  id: upload.id,
  fileName: upload.fileName,
  byteLength: sql<number>`octet_length(${upload.bytes})`,
  sha256: upload.sha256,
  state: upload.state,
  added: sql<number>`coalesce(jsonb_array_length(${upload.effect} -> 'added'), 0)`,
  updated: sql<number>`coalesce(jsonb_array_length(${upload.effect} -> 'updated'), 0)`,
  by: user.name,
  createdAt: upload.createdAt,
  committedAt: upload.committedAt,
  undoneAt: upload.undoneAt,
};

/** Keeps a file. @returns its id */
export async function insertUpload(
  db: Db,
  { studyId, values }: InStudy & { values: NewUpload },
): Promise<string> {
  const id = newId();
  await db.insert(upload).values({ ...values, id, studyId });
  return id;
}

/** One page of a study's uploads, the latest first. */
export async function listUploads(
  db: Db,
  { studyId, query, page, pageSize }: InStudy & { query: string; page: number; pageSize: number },
) {
  const where = and(
    eq(upload.studyId, studyId),
    query === '' ? undefined : ilike(upload.fileName, `%${query.replace(/[\\%_]/g, '\\$&')}%`),
  );
  const items = await db
    .select(summaryColumns)
    .from(upload)
    .innerJoin(user, eq(user.id, upload.createdBy))
    .where(where)
    .orderBy(desc(upload.createdAt), desc(upload.id))
    .limit(pageSize)
    .offset((page - 1) * pageSize);
  const [row] = await db.select({ n: count() }).from(upload).where(where);
  return { items, total: row?.n ?? 0 };
}

export async function findUploadSummary(db: Db, scope: OneUpload) {
  const [row] = await db
    .select(summaryColumns)
    .from(upload)
    .innerJoin(user, eq(user.id, upload.createdBy))
    .where(one(scope));
  return row;
}

/** A file as it came, with what was recognised in it and what its commit did. */
export async function findUpload(db: Db, scope: OneUpload) {
  const [row] = await db
    .select({
      fileName: upload.fileName,
      bytes: upload.bytes,
      reading: upload.reading,
      state: upload.state,
      effect: upload.effect,
    })
    .from(upload)
    .where(one(scope));
  return row;
}

export async function markCommitted(
  db: Db,
  { effect, ...scope }: OneUpload & { effect: Record<string, unknown> },
): Promise<void> {
  await db
    .update(upload)
    .set({ state: 'committed', effect, committedAt: sql`now()` })
    .where(one(scope));
}

export async function markUndone(db: Db, scope: OneUpload): Promise<void> {
  await db
    .update(upload)
    .set({ state: 'undone', undoneAt: sql`now()` })
    .where(one(scope));
}

/** Every site of a study, in the order they were added. */
export function listAllSites(db: Db, { studyId }: InStudy): Promise<SiteRow[]> {
  return db.select(siteColumns).from(site).where(present(studyId)).orderBy(asc(site.createdAt), asc(site.id));
}

const ROWS_A_STATEMENT = 1_000;

/**
 * Adds many sites, in their order. Rows travel as one JSON a statement: a parameter for each of ten thousand rows'
 * columns takes several times as long. @returns their ids
 */
export async function insertSites(
  db: Db,
  { studyId, uploadId, sites }: OneUpload & { sites: readonly SiteFields[] },
): Promise<string[]> {
  const rows = sites.map((fields) => ({ ...fields, id: newId() }));
  for (let i = 0; i < rows.length; i += ROWS_A_STATEMENT) {
    await db.execute(sql`
      insert into site (id, study_id, upload_id, code, name, name_key, latitude_deg, longitude_deg, elevation_m,
        permitted_azimuths_deg, notes, "values", particulars)
      select id, ${studyId}, ${uploadId}, code, name, "nameKey", "latitudeDeg", "longitudeDeg", "elevationM",
        "permittedAzimuthsDeg", notes, "values", particulars
      from ${recordset(rows.slice(i, i + ROWS_A_STATEMENT))}`);
  }
  return rows.map(({ id }) => id);
}

function recordset(rows: readonly (SiteFields & { id: string })[]): SQL {
  return sql`jsonb_to_recordset(${JSON.stringify(rows)}::jsonb) as new(
    id uuid, code text, name text, "nameKey" text, "latitudeDeg" float8, "longitudeDeg" float8, "elevationM" float8,
    "permittedAzimuthsDeg" jsonb, notes text, "values" jsonb, particulars jsonb)`;
}

/** Writes many sites and moves their versions, in one statement a thousand. */
export async function updateSites(
  db: Db,
  { studyId, sites }: InStudy & { sites: readonly (SiteFields & { id: string })[] },
): Promise<void> {
  for (let i = 0; i < sites.length; i += ROWS_A_STATEMENT) {
    await db.execute(sql`
      update site set
        code = new.code, name = new.name, name_key = new."nameKey",
        latitude_deg = new."latitudeDeg", longitude_deg = new."longitudeDeg", elevation_m = new."elevationM",
        permitted_azimuths_deg = new."permittedAzimuthsDeg", notes = new.notes, "values" = new."values",
        particulars = new.particulars,
        version = site.version + 1, updated_at = now()
      from ${recordset(sites.slice(i, i + ROWS_A_STATEMENT))}
      where site.id = new.id and site.study_id = ${studyId} and site.deleted_at is null`);
  }
}

/** Versions of sites that are still in the study; one that was removed is left out. */
export async function versionsOfSites(
  db: Db,
  { studyId, siteIds }: InStudy & { siteIds: readonly string[] },
): Promise<Map<string, number>> {
  const rows = await db
    .select({ id: site.id, version: site.version })
    .from(site)
    .where(and(present(studyId), inArray(site.id, [...siteIds])));
  return new Map(rows.map(({ id, version }) => [id, version]));
}

/** Whether any site of the study holds a figure under a criterion. */
export async function holdsFigures(
  db: Db,
  { studyId, criterionId }: InStudy & { criterionId: string },
): Promise<boolean> {
  const rows = await db
    .select({ id: site.id })
    .from(site)
    .where(and(present(studyId), sql`${site.values} ? ${criterionId}`))
    .limit(1);
  return rows.length > 0;
}

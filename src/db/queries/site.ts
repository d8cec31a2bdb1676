import { and, asc, count, desc, eq, ilike, inArray, isNotNull, isNull, or, sql, type SQL } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { user } from '../schema/auth.ts';
import { record } from '../schema/record.ts';
import { site } from '../schema/site.ts';

export type SiteRow = Omit<
  typeof site.$inferSelect,
  'nameKey' | 'uploadId' | 'createdAt' | 'updatedAt' | 'deletedAt'
>;
export type SiteFields = Omit<
  typeof site.$inferInsert,
  'id' | 'studyId' | 'version' | 'createdAt' | 'updatedAt' | 'deletedAt'
>;

const columns = {
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

interface InStudy {
  studyId: string;
}

const present = (studyId: string): SQL | undefined => and(eq(site.studyId, studyId), isNull(site.deletedAt));

/** Text to look for, taken literally. */
const containing = (query: string): string => `%${query.replace(/[\\%_]/g, '\\$&')}%`;

function matching({ studyId, query }: InStudy & { query: string }): SQL | undefined {
  if (query === '') return present(studyId);
  const like = containing(query);
  return and(present(studyId), or(ilike(site.code, like), ilike(site.name, like), ilike(site.notes, like)));
}

/** One page of a study's sites, latest change first. */
export async function listSites(
  db: Db,
  { page, pageSize, ...search }: InStudy & { query: string; page: number; pageSize: number },
): Promise<{ items: SiteRow[]; total: number }> {
  const items = await db
    .select(columns)
    .from(site)
    .where(matching(search))
    .orderBy(desc(site.updatedAt), desc(site.id))
    .limit(pageSize)
    .offset((page - 1) * pageSize);
  const [row] = await db.select({ n: count() }).from(site).where(matching(search));
  return { items, total: row?.n ?? 0 };
}

/** The first sites in the order they were added, as the Sites page draws them. */
export function firstSites(db: Db, { studyId, limit }: InStudy & { limit: number }): Promise<SiteRow[]> {
  return db
    .select(columns)
    .from(site)
    .where(present(studyId))
    .orderBy(asc(site.createdAt), asc(site.id))
    .limit(limit);
}

export async function countSites(db: Db, { studyId }: InStudy): Promise<number> {
  const [row] = await db.select({ n: count() }).from(site).where(present(studyId));
  return row?.n ?? 0;
}

export async function findSite(
  db: Db,
  { studyId, siteId }: InStudy & { siteId: string },
): Promise<SiteRow | undefined> {
  const [row] = await db
    .select(columns)
    .from(site)
    .where(and(present(studyId), eq(site.id, siteId)));
  return row;
}

export function findSites(db: Db, { studyId, siteIds }: InStudy & { siteIds: string[] }): Promise<SiteRow[]> {
  return db
    .select(columns)
    .from(site)
    .where(and(present(studyId), inArray(site.id, siteIds)));
}

export function findRemovedSites(
  db: Db,
  { studyId, siteIds }: InStudy & { siteIds: string[] },
): Promise<SiteRow[]> {
  return db
    .select(columns)
    .from(site)
    .where(and(eq(site.studyId, studyId), isNotNull(site.deletedAt), inArray(site.id, siteIds)));
}

/** Codes and folded names in use: what a new site may not take. */
export function listSiteKeys(db: Db, { studyId }: InStudy) {
  return db
    .select({ id: site.id, code: site.code, name: site.name, nameKey: site.nameKey })
    .from(site)
    .where(present(studyId));
}

export async function insertSite(
  db: Db,
  { studyId, values }: InStudy & { values: SiteFields },
): Promise<SiteRow> {
  const [row] = await db
    .insert(site)
    .values({ ...values, studyId })
    .returning(columns);
  if (!row) throw new Error('an insert returned no row');
  return row;
}

/** Writes a site and moves its version. */
export async function updateSite(
  db: Db,
  { studyId, siteId, values }: InStudy & { siteId: string; values: Partial<SiteFields> },
): Promise<SiteRow | undefined> {
  const [row] = await db
    .update(site)
    .set({ ...values, version: sql`${site.version} + 1`, updatedAt: sql`now()` })
    .where(and(present(studyId), eq(site.id, siteId)))
    .returning(columns);
  return row;
}

/** Removes or restores sites; both move their versions, so that an edit based on the time before is stale. */
export function markSites(
  db: Db,
  { studyId, siteIds, removed }: InStudy & { siteIds: string[]; removed: boolean },
): Promise<SiteRow[]> {
  return db
    .update(site)
    .set({
      deletedAt: removed ? sql`now()` : null,
      version: sql`${site.version} + 1`,
      updatedAt: sql`now()`,
    })
    .where(and(eq(site.studyId, studyId), inArray(site.id, siteIds)))
    .returning(columns);
}

/** Who changed a site last, and when. */
export async function lastChangeOfSite(db: Db, { studyId, siteId }: InStudy & { siteId: string }) {
  const [row] = await db
    .select({ by: user.name, at: record.at })
    .from(record)
    .leftJoin(user, eq(user.id, record.userId))
    .where(and(eq(record.studyId, studyId), eq(record.object, 'site'), eq(record.objectId, siteId)))
    .orderBy(desc(record.id))
    .limit(1);
  return row;
}

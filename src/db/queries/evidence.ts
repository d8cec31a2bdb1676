import { and, count, desc, eq, ilike, isNull, sql, type SQL } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { user } from '../schema/auth.ts';
import { criterion } from '../schema/criterion.ts';
import { evidence, site } from '../schema/site.ts';

interface InStudy {
  studyId: string;
}
interface OneFile extends InStudy {
  evidenceId: string;
}
interface OneFigure extends InStudy {
  siteId: string;
  criterionId: string;
}

export type NewEvidence = Pick<
  typeof evidence.$inferInsert,
  'siteId' | 'criterionId' | 'fileName' | 'mediaType' | 'bytes' | 'sha256' | 'createdBy'
>;

const columns = {
  id: evidence.id,
  siteId: evidence.siteId,
  criterionId: evidence.criterionId,
  fileName: evidence.fileName,
  mediaType: evidence.mediaType,
  byteLength: sql<number>`octet_length(${evidence.bytes})`,
  sha256: evidence.sha256,
  createdAt: evidence.createdAt,
};
const listed = { ...columns, by: user.name };

export type EvidenceRow = Awaited<ReturnType<typeof insertEvidence>> & { by: string };

/** Files that were not taken away, whose site and criterion are in the study. */
const present = (studyId: string): SQL | undefined =>
  and(eq(evidence.studyId, studyId), isNull(evidence.removedAt), isNull(site.deletedAt));

/** Keeps a file. */
export async function insertEvidence(db: Db, { studyId, values }: InStudy & { values: NewEvidence }) {
  const [row] = await db
    .insert(evidence)
    .values({ ...values, studyId })
    .returning(columns);
  if (!row) throw new Error('an insert returned no row');
  return row;
}

/** One page of a study's files, or of one site's or criterion's, the latest first. */
export async function listEvidence(
  db: Db,
  request: InStudy & {
    siteId?: string | undefined;
    criterionId?: string | undefined;
    query: string;
    page: number;
    pageSize: number;
  },
): Promise<{ items: EvidenceRow[]; total: number }> {
  const { studyId, siteId, criterionId, query, page, pageSize } = request;
  const where = and(
    present(studyId),
    siteId === undefined ? undefined : eq(evidence.siteId, siteId),
    criterionId === undefined ? undefined : eq(evidence.criterionId, criterionId),
    query === '' ? undefined : ilike(evidence.fileName, `%${query.replace(/[\\%_]/g, '\\$&')}%`),
  );
  const items = await db
    .select(listed)
    .from(evidence)
    .innerJoin(site, eq(site.id, evidence.siteId))
    .innerJoin(criterion, eq(criterion.id, evidence.criterionId))
    .innerJoin(user, eq(user.id, evidence.createdBy))
    .where(where)
    .orderBy(desc(evidence.createdAt), desc(evidence.id))
    .limit(pageSize)
    .offset((page - 1) * pageSize);
  const [row] = await db
    .select({ n: count() })
    .from(evidence)
    .innerJoin(site, eq(site.id, evidence.siteId))
    .innerJoin(criterion, eq(criterion.id, evidence.criterionId))
    .where(where);
  return { items, total: row?.n ?? 0 };
}

/** How many files each figure of a study has. */
export function countEvidence(db: Db, { studyId }: InStudy) {
  return db
    .select({ siteId: evidence.siteId, criterionId: evidence.criterionId, files: count() })
    .from(evidence)
    .innerJoin(site, eq(site.id, evidence.siteId))
    .where(present(studyId))
    .groupBy(evidence.siteId, evidence.criterionId);
}

export async function countFilesOf(db: Db, { studyId, siteId, criterionId }: OneFigure): Promise<number> {
  const [row] = await db
    .select({ n: count() })
    .from(evidence)
    .where(
      and(
        eq(evidence.studyId, studyId),
        eq(evidence.siteId, siteId),
        eq(evidence.criterionId, criterionId),
        isNull(evidence.removedAt),
      ),
    );
  return row?.n ?? 0;
}

export async function findEvidence(
  db: Db,
  { studyId, evidenceId }: OneFile,
): Promise<EvidenceRow | undefined> {
  const [row] = await db
    .select(listed)
    .from(evidence)
    .innerJoin(site, eq(site.id, evidence.siteId))
    .innerJoin(user, eq(user.id, evidence.createdBy))
    .where(and(present(studyId), eq(evidence.id, evidenceId)));
  return row;
}

/** A file with its bytes. */
export async function findEvidenceFile(db: Db, { studyId, evidenceId }: OneFile) {
  const [row] = await db
    .select({ fileName: evidence.fileName, mediaType: evidence.mediaType, bytes: evidence.bytes })
    .from(evidence)
    .innerJoin(site, eq(site.id, evidence.siteId))
    .where(and(present(studyId), eq(evidence.id, evidenceId)));
  return row;
}

export async function markEvidenceRemoved(db: Db, { studyId, evidenceId }: OneFile): Promise<void> {
  await db
    .update(evidence)
    .set({ removedAt: sql`now()` })
    .where(and(eq(evidence.studyId, studyId), eq(evidence.id, evidenceId)));
}

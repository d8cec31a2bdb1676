import { and, asc, eq, isNull, or, sql } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { criterion } from '../schema/criterion.ts';
import { evidence, site, type FigureParticulars } from '../schema/site.ts';
import { targetOrbit } from '../schema/study.ts';

export type CriterionRow = typeof criterion.$inferSelect;
export type NewCriterion = Omit<typeof criterion.$inferInsert, 'id' | 'studyId' | 'position' | 'version'>;

const columns = {
  id: criterion.id,
  studyId: criterion.studyId,
  position: criterion.position,
  name: criterion.name,
  nameKey: criterion.nameKey,
  unit: criterion.unit,
  direction: criterion.direction,
  source: criterion.source,
  quantity: criterion.quantity,
  orbitId: criterion.orbitId,
  levelMode: criterion.levelMode,
  worst: criterion.worst,
  best: criterion.best,
  shape: criterion.shape,
  groupId: criterion.groupId,
  ratingSteps: criterion.ratingSteps,
  limitKind: criterion.limitKind,
  limitValue: criterion.limitValue,
  version: criterion.version,
};

interface InStudy {
  studyId: string;
}

/** A study's criteria in the order shown. */
export function listCriteria(db: Db, { studyId }: InStudy): Promise<CriterionRow[]> {
  return db
    .select(columns)
    .from(criterion)
    .where(eq(criterion.studyId, studyId))
    .orderBy(asc(criterion.position));
}

export async function findCriterion(
  db: Db,
  { studyId, criterionId }: InStudy & { criterionId: string },
): Promise<CriterionRow | undefined> {
  const [row] = await db
    .select(columns)
    .from(criterion)
    .where(and(eq(criterion.studyId, studyId), eq(criterion.id, criterionId)));
  return row;
}

/** Adds a criterion after the last one. */
export async function insertCriterion(
  db: Db,
  { studyId, values }: InStudy & { values: NewCriterion },
): Promise<CriterionRow> {
  const last = sql<number>`(select coalesce(max(${criterion.position}) + 1, 0) from ${criterion} where ${criterion.studyId} = ${studyId})`;
  const [row] = await db
    .insert(criterion)
    .values({ ...values, studyId, position: last })
    .returning(columns);
  if (!row) throw new Error('an insert returned no row');
  return row;
}

/** Writes a criterion and moves its version. */
export async function updateCriterion(
  db: Db,
  { studyId, criterionId, values }: InStudy & { criterionId: string; values: Partial<NewCriterion> },
): Promise<CriterionRow | undefined> {
  const [row] = await db
    .update(criterion)
    .set({ ...values, version: sql`${criterion.version} + 1` })
    .where(and(eq(criterion.studyId, studyId), eq(criterion.id, criterionId)))
    .returning(columns);
  return row;
}

/** Puts one criterion in its place; versions stay, so that a reorder makes nobody's edit stale. */
export async function placeCriterion(
  db: Db,
  { studyId, criterionId, position }: InStudy & { criterionId: string; position: number },
): Promise<void> {
  await db
    .update(criterion)
    .set({ position })
    .where(and(eq(criterion.studyId, studyId), eq(criterion.id, criterionId)));
}

export async function deleteCriterion(
  db: Db,
  { studyId, criterionId }: InStudy & { criterionId: string },
): Promise<void> {
  await db.delete(criterion).where(and(eq(criterion.studyId, studyId), eq(criterion.id, criterionId)));
}

/** What was entered for each present site of the study, by criterion id. */
export function listEnteredValues(db: Db, { studyId }: InStudy) {
  return db
    .select({ siteId: site.id, values: site.values, particulars: site.particulars })
    .from(site)
    .where(and(eq(site.studyId, studyId), isNull(site.deletedAt)));
}

/** What is entered for a criterion: figures and particulars by site id, and the ids of its evidence files. */
interface TakenFigures {
  figures: Record<string, number | string>;
  particulars: Record<string, FigureParticulars>;
  evidence: string[];
}

/** Takes all that was entered for a criterion out of every site of the study and returns it, for the record. */
export async function takeFigures(
  db: Db,
  { studyId, criterionId }: InStudy & { criterionId: string },
): Promise<TakenFigures> {
  const held = and(
    eq(site.studyId, studyId),
    or(sql`${site.values} ? ${criterionId}`, sql`${site.particulars} ? ${criterionId}`),
  );
  const rows = await db
    .select({
      id: site.id,
      figure: sql<number | string | null>`${site.values} -> ${criterionId}`,
      particulars: sql<FigureParticulars | null>`${site.particulars} -> ${criterionId}`,
    })
    .from(site)
    .where(held);
  await db
    .update(site)
    .set({
      values: sql`${site.values} - ${criterionId}::text`,
      particulars: sql`${site.particulars} - ${criterionId}::text`,
    })
    .where(held);
  const files = await db
    .update(evidence)
    .set({ removedAt: sql`now()` })
    .where(
      and(eq(evidence.studyId, studyId), eq(evidence.criterionId, criterionId), isNull(evidence.removedAt)),
    )
    .returning({ id: evidence.id });
  return {
    figures: bySite(rows, ({ figure }) => figure),
    particulars: bySite(rows, ({ particulars }) => particulars),
    evidence: files.map(({ id }) => id),
  };
}

/** What each row holds, by site id; rows that hold none are left out. */
function bySite<R extends { id: string }, V>(
  rows: readonly R[],
  read: (row: R) => V | null,
): Record<string, V> {
  return Object.fromEntries(
    rows.flatMap((row) => {
      const held = read(row);
      return held === null ? [] : [[row.id, held]];
    }),
  );
}

/** The name of a study's orbit, as criteria are named after it. */
export async function findOrbitName(
  db: Db,
  { studyId, orbitId }: InStudy & { orbitId: string },
): Promise<string | undefined> {
  const [row] = await db
    .select({ code: targetOrbit.code, name: targetOrbit.name })
    .from(targetOrbit)
    .where(and(eq(targetOrbit.studyId, studyId), eq(targetOrbit.id, orbitId)));
  return row && (row.name || row.code);
}

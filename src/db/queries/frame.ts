import { and, count, eq, exists, isNull, sql } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { criterion, weightSet } from '../schema/criterion.ts';
import { site } from '../schema/site.ts';
import { study, studyVehicle, targetOrbit } from '../schema/study.ts';

const lacksFigure = (db: Db) =>
  exists(
    db
      .select({ one: sql`1` })
      .from(criterion)
      .where(
        and(
          eq(criterion.studyId, site.studyId),
          eq(criterion.source, 'entered'),
          sql`not ${site.values} ? ${criterion.id}::text`,
        ),
      ),
  );

/** A study's title block and what there is in its sections, in one statement. */
export async function findFrame(db: Db, { studyId }: { studyId: string }) {
  const [row] = await db
    .select({
      id: study.id,
      title: study.title,
      organisation: study.organisation,
      question: study.question,
      state: study.state,
      revision: study.revision,
      savedAt: study.savedAt,
      archivedAt: study.archivedAt,
      orbits: sql<number>`(${db
        .select({ n: count() })
        .from(targetOrbit)
        .where(eq(targetOrbit.studyId, study.id))})::int`,
      sites: sql<number>`(${db
        .select({ n: count() })
        .from(site)
        .where(and(eq(site.studyId, study.id), isNull(site.deletedAt)))})::int`,
      /** Criteria that are weighed: a text criterion is only shown. */
      criteria: sql<number>`(${db
        .select({ n: count() })
        .from(criterion)
        .where(and(eq(criterion.studyId, study.id), sql`${criterion.source} <> 'text'`))})::int`,
      weighted: sql<boolean>`exists(${db
        .select({ one: sql`1` })
        .from(weightSet)
        .where(
          and(
            eq(weightSet.studyId, study.id),
            isNull(weightSet.userId),
            sql`jsonb_path_exists(${weightSet.points}, '$.* ? (@ > 0)')`,
          ),
        )})`,
      /** Sites that lack a figure of an entered criterion. */
      gaps: sql<number>`(${db
        .select({ n: count() })
        .from(site)
        .where(and(eq(site.studyId, study.id), isNull(site.deletedAt), lacksFigure(db)))})::int`,
      vehicleName: sql<string | null>`(${db
        .select({ name: sql`coalesce(${studyVehicle.spec} ->> 'name', '')` })
        .from(studyVehicle)
        .where(eq(studyVehicle.studyId, study.id))})`,
    })
    .from(study)
    .where(eq(study.id, studyId));
  return row;
}

import { and, count, desc, eq, ilike, isNotNull, isNull, or, sql } from 'drizzle-orm';
import type { Db } from '../client.ts';
import { member, study } from '../schema/study.ts';

export type NewStudy = typeof study.$inferInsert;
type StudyValues = Partial<
  Pick<
    NewStudy,
    'title' | 'organisation' | 'question' | 'decideBy' | 'archivedAt' | 'turnSpeedFraction' | 'losses'
  >
>;

const columns = {
  id: study.id,
  title: study.title,
  organisation: study.organisation,
  question: study.question,
  decideBy: study.decideBy,
  state: study.state,
  archivedAt: study.archivedAt,
  revision: study.revision,
  savedAt: study.savedAt,
  version: study.version,
  turnSpeedFraction: study.turnSpeedFraction,
  losses: study.losses,
  settingsVersion: study.settingsVersion,
  updatedAt: study.updatedAt,
};

interface StudyFilter {
  userId: string;
  query: string;
  state?: 'draft' | 'in-review' | 'baselined' | undefined;
  archived: 'false' | 'true' | 'all';
}

/** Text as a pattern that finds it anywhere, its own wildcards taken literally. */
export const containing = (text: string): string => `%${text.replace(/[\\%_]/g, (c) => `\\${c}`)}%`;

function matches({ query, state, archived }: StudyFilter) {
  const pattern = containing(query);
  return and(
    query
      ? or(ilike(study.title, pattern), ilike(study.organisation, pattern), ilike(study.question, pattern))
      : undefined,
    state ? eq(study.state, state) : undefined,
    archived === 'all'
      ? undefined
      : archived === 'true'
        ? isNotNull(study.archivedAt)
        : isNull(study.archivedAt),
  );
}

/** The studies a person is a member of, latest change first, with the person's role in each. */
export async function listStudies(
  db: Db,
  { page, pageSize, ...filter }: StudyFilter & { page: number; pageSize: number },
) {
  const mine = and(eq(member.studyId, study.id), eq(member.userId, filter.userId));
  const rows = await db
    .select({ ...columns, role: member.role })
    .from(study)
    .innerJoin(member, mine)
    .where(matches(filter))
    .orderBy(desc(study.updatedAt), desc(study.id))
    .limit(pageSize)
    .offset((page - 1) * pageSize);
  const [counted] = await db
    .select({ n: count() })
    .from(study)
    .innerJoin(member, mine)
    .where(matches(filter));
  return { rows, total: counted?.n ?? 0 };
}

/** One study; who may see it has been decided by then. */
export async function findStudy(db: Db, { studyId }: { studyId: string }) {
  const [row] = await db.select(columns).from(study).where(eq(study.id, studyId));
  return row;
}

/** Locks a study's row until the transaction ends. @returns whether there is one */
export async function lockStudy(db: Db, { studyId }: { studyId: string }): Promise<boolean> {
  const rows = await db.select({ id: study.id }).from(study).where(eq(study.id, studyId)).for('update');
  return rows.length > 0;
}

export async function insertStudy(db: Db, values: NewStudy) {
  const [row] = await db.insert(study).values(values).returning(columns);
  if (!row) throw new Error('an insert returned no row');
  return row;
}

/** Writes the study's own fields and moves their version. */
export async function updateStudy(db: Db, { studyId, values }: { studyId: string; values: StudyValues }) {
  const [row] = await db
    .update(study)
    .set({ ...values, version: sql`${study.version} + 1` })
    .where(eq(study.id, studyId))
    .returning(columns);
  return row;
}

/** Writes the settings and moves their version. */
export async function updateSettings(
  db: Db,
  { studyId, values }: { studyId: string; values: Pick<StudyValues, 'turnSpeedFraction' | 'losses'> },
) {
  const [row] = await db
    .update(study)
    .set({ ...values, settingsVersion: sql`${study.settingsVersion} + 1` })
    .where(eq(study.id, studyId))
    .returning(columns);
  return row;
}

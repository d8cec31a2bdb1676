import { eq, sql } from 'drizzle-orm';
import type { Db, PooledDb } from '#db/client.ts';
import { insertEntries, type RecordEntry } from '#db/queries/record.ts';
import { study } from '#db/schema/study.ts';
import { AppError, notFound } from '#server/errors.ts';
import type { Member } from '#server/member.ts';

export type { RecordEntry };

/** Writes lines of the record within the change's transaction. */
export async function writeRecord(
  tx: Db,
  by: { studyId: string | null; userId: string | null; revision: number | null },
  entries: readonly RecordEntry[],
): Promise<void> {
  if (entries.length > 0) await insertEntries(tx, { ...by, entries });
}

export type StudyRow = typeof study.$inferSelect;

/** What a change touches: inputs (locked in review, move the revision), the study's weights (the same), or neither. */
export type ChangeKind = 'inputs' | 'weights' | 'apart';

/** Where a change left the study; the screens show it. */
export interface Saved {
  revision: number;
  /** ISO 8601, UTC: when the revision last moved. */
  savedAt: string;
}

interface Change<T> {
  result: T;
  entries: readonly RecordEntry[];
}

function refuseLocked(row: StudyRow, kind: ChangeKind): void {
  if (row.archivedAt)
    throw new AppError('study-archived', 'The study is archived. Restore it before you change it.', {
      current: { archivedAt: row.archivedAt.toISOString() },
    });
  if (kind !== 'apart' && row.state === 'in-review')
    throw new AppError(
      'study-locked',
      'The study is in review: its inputs are locked. Nothing was changed.',
      {
        current: { state: row.state },
      },
    );
}

/**
 * The one way to change a study: locks its row, refuses what its state refuses, runs the change, moves the
 * revision and writes the record, all in one transaction. A change that writes no record line moves nothing.
 *
 * @param allowArchived for restoring an archived study alone
 * @throws AppError 'not-found' · 'study-archived' · 'study-locked' · 'forbidden'
 */
export async function changeStudy<T>(
  db: PooledDb,
  { member, kind, allowArchived = false }: { member: Member; kind: ChangeKind; allowArchived?: boolean },
  change: (tx: Db, row: StudyRow) => Promise<Change<T>>,
): Promise<T & Saved> {
  return db.transaction(async (tx) => {
    const [row] = await tx.select().from(study).where(eq(study.id, member.studyId)).for('update');
    if (!row) throw notFound();
    if (!(allowArchived && row.archivedAt)) refuseLocked(row, kind);
    if (row.state === 'baselined' && kind !== 'apart' && member.role !== 'lead')
      throw new AppError(
        'forbidden',
        'After a baseline the lead makes the next change. Nothing was changed.',
      );
    const { result, entries } = await change(tx, row);
    const moves = kind !== 'apart' && entries.length > 0;
    const revision = row.revision + (moves ? 1 : 0);
    let { savedAt } = row;
    if (entries.length > 0) {
      const [saved] = await tx
        .update(study)
        .set({
          revision,
          updatedAt: sql`now()`,
          ...(moves ? { savedAt: sql`now()`, state: 'draft' as const } : {}),
        })
        .where(eq(study.id, row.id))
        .returning({ savedAt: study.savedAt });
      savedAt = saved?.savedAt ?? savedAt;
    }
    await writeRecord(tx, { studyId: row.id, userId: member.userId, revision }, entries);
    return { ...result, revision, savedAt: savedAt.toISOString() };
  });
}

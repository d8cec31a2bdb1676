import type { Study, StudyList, StudyListQuery } from '#contract/study.ts';
import type { Db } from '#db/client.ts';
import { findStudy, listStudies as listRows } from '#db/queries/study.ts';
import { notFound } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { presentStudy } from './present.ts';

/** The studies a person is a member of, latest change first. */
export async function listStudies(
  db: Db,
  { userId, ...query }: StudyListQuery & { userId: string },
): Promise<StudyList> {
  const { rows, total } = await listRows(db, { userId, ...query });
  return { items: rows.map((row) => presentStudy(row, row.role)), total };
}

/** The member's study. @throws AppError 'not-found' */
export async function readStudy(db: Db, member: Member): Promise<Study> {
  const row = await findStudy(db, { studyId: member.studyId });
  if (!row) throw notFound();
  return presentStudy(row, member.role);
}

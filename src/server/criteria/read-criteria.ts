import type { Criterion, CriterionList } from '#contract/criterion.ts';
import type { ListQuery } from '#contract/list.ts';
import type { Db } from '#db/client.ts';
import { findCriterion, listCriteria } from '#db/queries/criterion.ts';
import { notFound } from '#server/errors.ts';
import { presentCriterion } from './present.ts';

/** A study's criteria in the order shown. */
export async function readCriteria(db: Db, scope: { studyId: string }): Promise<Criterion[]> {
  return (await listCriteria(db, scope)).map(presentCriterion);
}

/** A page of them; a study has so few that they are cut here and not in the query. */
export async function listCriteriaPage(
  db: Db,
  { studyId, query, page, pageSize }: { studyId: string } & ListQuery,
): Promise<CriterionList> {
  const sought = query.toLowerCase();
  const found = (await readCriteria(db, { studyId })).filter(({ name }) =>
    name.toLowerCase().includes(sought),
  );
  return { items: found.slice((page - 1) * pageSize, page * pageSize), total: found.length };
}

/** @throws AppError 'not-found' */
export async function readCriterion(
  db: Db,
  scope: { studyId: string; criterionId: string },
): Promise<Criterion> {
  const row = await findCriterion(db, scope);
  if (!row) throw notFound('There is no such criterion in this study.');
  return presentCriterion(row);
}

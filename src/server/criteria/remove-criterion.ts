import type { PooledDb } from '#db/client.ts';
import {
  deleteCriterion,
  findCriterion,
  listCriteria,
  placeCriterion,
  takeFigures,
} from '#db/queries/criterion.ts';
import { changeStudy } from '#server/change-study.ts';
import { notFound, stale } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { presentCriterion } from './present.ts';

/**
 * Removes a criterion with the figures entered for it, their particulars and evidence; the record keeps them. Points
 * given to it in sets of weights count for nothing from here on. @throws AppError 'not-found' · 'stale'
 */
export async function removeCriterion(
  db: PooledDb,
  { member, criterionId, version }: { member: Member; criterionId: string; version: number },
): Promise<{ revision: number }> {
  const { studyId } = member;
  return changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    const row = await findCriterion(tx, { studyId, criterionId });
    if (!row) throw notFound('There is no such criterion in this study.');
    const before = presentCriterion(row);
    if (row.version !== version) throw stale(before);
    const taken = await takeFigures(tx, { studyId, criterionId });
    await deleteCriterion(tx, { studyId, criterionId });
    for (const [position, { id }] of (await listCriteria(tx, { studyId })).entries()) {
      await placeCriterion(tx, { studyId, criterionId: id, position });
    }
    const from = { ...before, ...taken };
    return { result: {}, entries: [{ object: 'criterion', objectId: criterionId, action: 'remove', from }] };
  });
}

import type { Weights, WeightsDraft, WeightsOf } from '#contract/weights.ts';
import type { Db, PooledDb } from '#db/client.ts';
import { listCriteria } from '#db/queries/criterion.ts';
import { findWeights, writeWeights } from '#db/queries/weights.ts';
import { changeStudy } from '#server/change-study.ts';
import { AppError, stale } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { presentWeights, readWeights } from './read-weights.ts';

interface SaveRequest {
  member: Member;
  weights: WeightsOf;
  /** The version the points are based on; 0 where the set has never been saved. */
  version: number;
  input: WeightsDraft;
}

/**
 * Writes a set of weights whole. The study's set is a lead's to write and moves the revision; a member's own moves
 * nothing of the study's and goes on in review. @throws AppError 'forbidden' · 'stale' · 'invalid'
 */
export async function saveWeights(
  db: PooledDb,
  { member, weights, version, input }: SaveRequest,
): Promise<Weights & { revision: number }> {
  if (weights === 'study' && member.role !== 'lead')
    throw new AppError('forbidden', 'A lead sets the study’s weights. Keep a set of your own instead.');
  const { studyId, userId } = member;
  const mine = weights === 'mine';
  return changeStudy(db, { member, kind: mine ? 'apart' : 'weights' }, async (tx) => {
    const set = { studyId, userId: mine ? userId : null };
    const kept = await findWeights(tx, set);
    const before = await readWeights(tx, { studyId, userId, weights });
    if ((kept?.version ?? 0) !== version) throw stale(before);
    const ids = await weighable(tx, studyId, input);
    const unchanged = kept && ids.every((id) => (kept.points[id] ?? 0) === (input.points?.[id] ?? 0));
    if (unchanged) return { result: before, entries: [] };
    const row = await writeWeights(tx, { ...set, id: kept?.id ?? null, points: input.points ?? {} });
    const after = presentWeights({ weights, ids, set: row, version: row.version });
    return {
      result: after,
      entries: [
        {
          object: mine ? 'own-weights' : 'weights',
          objectId: row.id,
          action: 'change',
          from: before.points,
          to: after.points,
        },
      ],
    };
  });
}

async function weighable(tx: Db, studyId: string, { points = {} }: WeightsDraft): Promise<string[]> {
  const ids = (await listCriteria(tx, { studyId }))
    .filter(({ source }) => source !== 'text')
    .map(({ id }) => id);
  const unknown = Object.keys(points).filter((id) => !ids.includes(id));
  if (unknown.length > 0)
    throw new AppError('invalid', 'Points were given to what is no weighed criterion of this study.', {
      errors: unknown.map((id) => ({
        path: `points.${id}`,
        message: 'There is no such criterion to weigh.',
      })),
    });
  return ids;
}

import type { Weights, WeightsOf } from '#contract/weights.ts';
import { weightsFromPoints } from '#core/decision/weights.ts';
import type { Db } from '#db/client.ts';
import { listCriteria } from '#db/queries/criterion.ts';
import { findWeights } from '#db/queries/weights.ts';

interface Which {
  studyId: string;
  userId: string;
  weights: WeightsOf;
}

/** A set of points and the shares they give. A member's own set starts as a copy of the study's, at version 0. */
export async function readWeights(db: Db, { studyId, userId, weights }: Which): Promise<Weights> {
  const own = weights === 'mine' ? await findWeights(db, { studyId, userId }) : undefined;
  const set = own ?? (await findWeights(db, { studyId, userId: null }));
  const ids = (await listCriteria(db, { studyId }))
    .filter(({ source }) => source !== 'text')
    .map(({ id }) => id);
  const version = weights === 'mine' ? (own?.version ?? 0) : (set?.version ?? 0);
  return presentWeights({ weights, ids, points: set?.points ?? {}, version });
}

/** Points of criteria that exist, each with its share; what was given to criteria since removed is left out. */
export function presentWeights({
  weights,
  ids,
  points,
  version,
}: {
  weights: WeightsOf;
  ids: readonly string[];
  points: Readonly<Record<string, number>>;
  version: number;
}): Weights {
  const given = ids.map((id) => points[id] ?? 0);
  const result = weightsFromPoints(given);
  const byId = (figures: ArrayLike<number>) =>
    Object.fromEntries(ids.map((id, at) => [id, figures[at] ?? 0]));
  return {
    weights,
    points: byId(given),
    shares: result.kind === 'set' ? byId(result.weights) : null,
    version,
  };
}

import { pointsStatement, type Weights, type WeightsOf } from '#contract/weights.ts';
import { weightsFromPoints } from '#core/decision/weights.ts';
import type { Db } from '#db/client.ts';
import { listCriteria } from '#db/queries/criterion.ts';
import { findWeights } from '#db/queries/weights.ts';

interface Which {
  studyId: string;
  userId: string;
  weights: WeightsOf;
}

/**
 * A set and the shares it gives. A member's own set starts as a copy of the study's, at version 0.
 */
export async function readWeights(db: Db, { studyId, userId, weights }: Which): Promise<Weights> {
  const own = weights === 'mine' ? await findWeights(db, { studyId, userId }) : undefined;
  const set = own ?? (await findWeights(db, { studyId, userId: null }));
  const ids = (await listCriteria(db, { studyId }))
    .filter(({ source }) => source !== 'text')
    .map(({ id }) => id);
  return presentWeights({
    weights,
    ids,
    set: set ?? UNSET,
    version: (weights === 'mine' ? own : set)?.version ?? 0,
  });
}

type KeptSet = NonNullable<Awaited<ReturnType<typeof findWeights>>>;
type Said = Pick<KeptSet, 'method' | 'points' | 'order' | 'judgements' | 'shared' | 'origin' | 'reason'>;
const UNSET: Said = { ...pointsStatement({}), shared: false, origin: null, reason: '' };

/** Points of criteria that exist, each with its share; what was given to criteria since removed is left out. */
export function presentWeights({
  weights,
  ids,
  set,
  version,
}: {
  weights: WeightsOf;
  ids: readonly string[];
  set: Said;
  version: number;
}): Weights {
  const given = ids.map((id) => set.points[id] ?? 0);
  const result = weightsFromPoints(given);
  const byId = (figures: ArrayLike<number>) =>
    Object.fromEntries(ids.map((id, at) => [id, figures[at] ?? 0]));
  const study = weights === 'study';
  return {
    weights,
    method: set.method,
    points: byId(given),
    order: set.order,
    judgements: set.judgements,
    shares: result.kind === 'set' ? byId(result.weights) : null,
    levels: [],
    shared: !study && set.shared,
    origin: study ? set.origin : null,
    reason: study ? set.reason : '',
    version,
  };
}

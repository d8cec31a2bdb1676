import { statementNow, weighing } from '#contract/weighing.ts';
import { pointsStatement, type Weights, type WeightsOf, type WeightStatement } from '#contract/weights.ts';
import type { WeighItem } from '#core/decision/statement.ts';
import type { Db } from '#db/client.ts';
import { findWeights, listWeighed } from '#db/queries/weights.ts';

interface Which {
  studyId: string;
  userId: string;
  weights: WeightsOf;
}

/**
 * A set and the weights it comes to. A member's own set starts as a copy of the study's, at version 0.
 */
export async function readWeights(db: Db, { studyId, userId, weights }: Which): Promise<Weights> {
  const own = weights === 'mine' ? await findWeights(db, { studyId, userId }) : undefined;
  const set = own ?? (await findWeights(db, { studyId, userId: null }));
  return presentWeights({
    weights,
    items: await listWeighed(db, { studyId }),
    set: set ?? UNSET,
    version: (weights === 'mine' ? own : set)?.version ?? 0,
  });
}

export type KeptSet = NonNullable<Awaited<ReturnType<typeof findWeights>>>;
type Said = Pick<KeptSet, 'method' | 'points' | 'order' | 'judgements' | 'shared' | 'origin' | 'reason'>;
const UNSET: Said = { ...pointsStatement({}), shared: false, origin: null, reason: '' };

/** What is said of criteria and groups that exist, and what it comes to. */
export function presentWeights({
  weights,
  items,
  set,
  version,
}: {
  weights: WeightsOf;
  items: readonly WeighItem[];
  set: Said;
  version: number;
}): Weights {
  const study = weights === 'study';
  const origin = version > 0 ? (set.origin ?? { kind: 'apart' as const }) : null;
  return {
    weights,
    ...presentStatement(items, set),
    shared: !study && version > 0 && set.shared,
    origin: study ? origin : null,
    reason: study ? set.reason : '',
    version,
  };
}

/** A statement as it reads now, with the weights it comes to. */
export const presentStatement = (items: readonly WeighItem[], said: WeightStatement) => ({
  ...statementNow(items, said),
  ...weighing(items, said),
});

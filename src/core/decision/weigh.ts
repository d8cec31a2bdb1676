import { rankOrderCentroid } from './centroid.ts';
import { judgedIds, weightsFromJudgements, type Consistency } from './judgements.ts';
import { levelsOf, type Siblings, type WeighItem, type WeightStatement } from './statement.ts';
import { weightsFromSwing } from './swing.ts';
import { weightsFromPoints } from './weights.ts';

export { missingPairs, type Consistency } from './judgements.ts';
export type { Judgement, WeighItem, WeightMethod, WeightStatement } from './statement.ts';

/** One level, weighed. */
export interface Level extends Siblings {
  /** By `ids`, summing to 1; null where the level is unset. */
  weights: Float64Array | null;
  /** Ids that the statement says nothing of: their weight is 0 until it does. */
  unjudged: string[];
  /** Pairwise comparison of two things or more. */
  consistency: Consistency | null;
}

/** The weights of all criteria, in their order, summing to 1; or `unset` where nothing can be weighed. */
export type Weighed =
  { kind: 'set'; weights: Float64Array; levels: Level[] } | { kind: 'unset'; levels: Level[] };

/**
 * Turns a statement of weights into weights: a criterion's weight is its group's times its own within the group.
 * A level of one thing gives it weight 1, but for one ungrouped criterion alone that has no points. What the statement
 * does not judge has weight 0; what it judges and exists no more is ignored; a group that is unset counts as 0.
 * @param items the criteria, in order.
 * @throws RangeError when points are negative or not finite, the largest swing of a level is not 100, an order names
 * something twice, or judgements of a level leave a pair out, are not 1/9 to 9 or compare more than 10 things. A
 * statement that was complete before criteria were removed or moved is made so again by `settled`.
 */
export function weigh(items: readonly WeighItem[], statement: WeightStatement): Weighed {
  const [top, ...groups] = levelsOf(items);
  const all = new Set(items.flatMap(({ id, groupId }) => (groupId === null ? [id] : [id, groupId])));
  const within = groups.map((group) => levelOf(group, statement, all, true));
  const unset = new Set(within.filter(({ weights }) => weights === null).map(({ groupId }) => groupId));
  const grouped = new Set<string | null>(groups.map(({ groupId }) => groupId));
  const siblings = top ?? { groupId: null, ids: [] };
  const above = without(unset, levelOf(siblings, statement, all, grouped.has(siblings.ids[0] ?? '')));
  const levels = [above, ...within];
  if (above.weights === null) return { kind: 'unset', levels };
  const shares = new Map(levels.map((level) => [level.groupId, sharesOf(level)]));
  const shareOf = (level: string | null, id: string): number => shares.get(level)?.get(id) ?? 0;
  const weights = Float64Array.from(items, ({ id, groupId }) =>
    groupId === null ? shareOf(null, id) : shareOf(null, groupId) * shareOf(groupId, id),
  );
  return { kind: 'set', weights, levels };
}

const sharesOf = ({ ids, weights }: Level): Map<string, number> =>
  new Map(ids.map((id, place) => [id, weights?.[place] ?? 0]));

/** What a statement says of one level: weights by `judged`, null where they are all 0 or there are none. */
interface Stated {
  judged: readonly string[];
  weights: Float64Array | null;
  consistency: Consistency | null;
}

/** @param takesAll whether one thing alone has weight 1 whatever is said of it */
function levelOf(
  siblings: Siblings,
  statement: WeightStatement,
  all: ReadonlySet<string>,
  takesAll: boolean,
): Level {
  const { ids } = siblings;
  const points = statement.method === 'points' || statement.method === 'swing';
  if (ids.length === 1 && (takesAll || !points))
    return { ...siblings, weights: Float64Array.of(1), unjudged: [], consistency: null };
  const { judged, weights, consistency } = points
    ? statedByPoints(ids, statement)
    : statement.method === 'pairwise'
      ? statedByJudgements(ids, statement, all)
      : statedByOrder(ids, statement);
  const given = new Map(judged.map((id, place) => [id, weights?.[place] ?? 0]));
  return {
    ...siblings,
    weights: weights && Float64Array.from(ids, (id) => given.get(id) ?? 0),
    unjudged: ids.filter((id) => !given.has(id)),
    consistency,
  };
}

function statedByPoints(ids: readonly string[], { method, points }: WeightStatement): Stated {
  const judged = ids.filter((id) => Object.hasOwn(points, id));
  const own = judged.map((id) => points[id] ?? 0);
  const given = weightsFromPoints(own);
  if (given.kind === 'unset') return { judged, weights: null, consistency: null };
  // One criterion alone has no other swing to be compared with.
  const swing = method === 'swing' && ids.length > 1;
  return { judged, weights: swing ? weightsFromSwing(own) : given.weights, consistency: null };
}

function statedByJudgements(
  ids: readonly string[],
  { judgements }: WeightStatement,
  all: ReadonlySet<string>,
): Stated {
  const judged = judgedIds(ids, judgements, all);
  if (judged.length === 0) return { judged, weights: null, consistency: null };
  return { judged, ...weightsFromJudgements(judged, judgements) };
}

function statedByOrder(ids: readonly string[], { order }: WeightStatement): Stated {
  const judged = order.filter((id) => ids.includes(id));
  if (new Set(judged).size < judged.length)
    throw new RangeError(`order: ${judged.join(', ')} names one thing twice`);
  return { judged, weights: judged.length > 0 ? rankOrderCentroid(judged.length) : null, consistency: null };
}

/** Takes the weight of unset groups away and shares it out among the rest in proportion. */
function without(unset: ReadonlySet<string | null>, level: Level): Level {
  if (level.weights === null || unset.size === 0) return level;
  const left = weightsFromPoints(
    level.weights.map((w, place) => (unset.has(level.ids[place] ?? null) ? 0 : w)),
  );
  return { ...level, weights: left.kind === 'set' ? left.weights : null };
}

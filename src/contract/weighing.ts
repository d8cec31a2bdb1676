/* From a statement of weights to what follows from it: the one way, for the server, the screens and the memo. */
import { settled } from '#core/decision/settled.ts';
import type { WeighItem } from '#core/decision/statement.ts';
import { weigh, type Level, type Weighed } from '#core/decision/weigh.ts';
import { MOST_POINTS } from './points.ts';
import type { WeightLevel, WeightStatement } from './weights.ts';

/** Judgements can disagree from three things on. */
const LEAST_COMPARED = 3;

/** Weights of the criteria that stand now, whatever stood when the statement was made. */
export const weighNow = (items: readonly WeighItem[], statement: WeightStatement): Weighed =>
  weigh(items, settled(items, statement));

/** What a statement comes to, by id. */
export interface Weighing {
  /** The weight of each criterion, summing to 1; null where nothing is said yet. */
  shares: Record<string, number> | null;
  levels: WeightLevel[];
}

export function weighing(items: readonly WeighItem[], statement: WeightStatement): Weighing {
  const weighed = weighNow(items, statement);
  const ids = items.map(({ id }) => id);
  return {
    shares: weighed.kind === 'set' ? byId(ids, weighed.weights) : null,
    levels: weighed.levels.map(presentLevel),
  };
}

const byId = (ids: readonly string[], figures: ArrayLike<number>): Record<string, number> =>
  Object.fromEntries(ids.map((id, at) => [id, figures[at] ?? 0]));

function presentLevel({ groupId, ids, weights, unjudged, consistency }: Level): WeightLevel {
  const judged = ids.length - unjudged.length;
  return {
    groupId,
    ids,
    weights: weights && byId(ids, weights),
    unjudged,
    consistency: judged >= LEAST_COMPARED ? consistency : null,
  };
}

/**
 * A set as it is read now: swings raised where the largest has gone, and nothing said of what is no more. Judgements
 * against what is gone stay: they still say that the other has been judged.
 */
export function statementNow(
  items: readonly WeighItem[],
  { method, points, order, judgements }: WeightStatement,
): WeightStatement {
  const known = new Set(items.flatMap(({ id, groupId }) => (groupId === null ? [id] : [id, groupId])));
  const raised = settled(items, { method, points, order, judgements }).points;
  return {
    method,
    points: Object.fromEntries(Object.entries(raised).filter(([id]) => known.has(id))),
    order: order.filter((id) => known.has(id)),
    judgements: judgements.filter(([a, b]) => known.has(a) || known.has(b)),
  };
}

/**
 * Weights stated as points, so that groups still count: a group has the sum of its criteria's weights, and within it
 * each criterion its part of that.
 * @param shares weights by criterion id.
 */
export function pointsOfShares(
  items: readonly WeighItem[],
  shares: Readonly<Record<string, number>>,
): Record<string, number> {
  const sums = new Map<string, number>();
  for (const { id, groupId } of items)
    if (groupId !== null) sums.set(groupId, (sums.get(groupId) ?? 0) + (shares[id] ?? 0));
  // Rounding may carry a whole level's weight a last digit past 1.
  const points = (share: number, of: number): number =>
    of === 0 ? 0 : Math.min(MOST_POINTS, (MOST_POINTS * share) / of);
  const own = items.map(({ id, groupId }): [string, number] => [
    id,
    points(shares[id] ?? 0, groupId === null ? 1 : (sums.get(groupId) ?? 0)),
  ]);
  return Object.fromEntries([
    ...own,
    ...[...sums].map(([id, sum]): [string, number] => [id, points(sum, 1)]),
  ]);
}

/** The mean of several sets' weights, by criterion id; null without any. */
export function meanShares(
  items: readonly WeighItem[],
  sets: readonly Readonly<Record<string, number>>[],
): Record<string, number> | null {
  if (sets.length === 0) return null;
  return Object.fromEntries(
    items.map(({ id }) => [id, sets.reduce((sum, set) => sum + (set[id] ?? 0), 0) / sets.length]),
  );
}

import { pointsOfShares, weighing } from '#contract/weighing.ts';
import { MOST_POINTS } from '#contract/points.ts';
import { pointsStatement, type WeightMethod, type WeightStatement } from '#contract/weights.ts';
import { missingPairs } from '#core/decision/judgements.ts';
import { MOST_COMPARED } from '#core/decision/pairwise.ts';
import { levelsOf, type Siblings, type WeighItem } from '#core/decision/statement.ts';
import { FULL_SWING } from '#core/decision/swing.ts';
import { MOST_RATIO } from './judgement.ts';

/** What a statement still lacks before weights can be worked out from it: how many of what. */
export interface Missing {
  count: number;
  /** "judgement", "swing", "place in the order" */
  what: string;
}

/** Levels at which something is compared with something else. */
export const comparedLevels = (items: readonly WeighItem[]): Siblings[] =>
  levelsOf(items).filter(({ ids }) => ids.length > 1);

export function missingOf(items: readonly WeighItem[], statement: WeightStatement): Missing | null {
  const levels = comparedLevels(items);
  const { method, points, order, judgements } = statement;
  const counted = (what: string, count: number): Missing | null => (count > 0 ? { count, what } : null);
  if (method === 'pairwise')
    return counted(
      'judgement',
      levels.reduce((sum, { ids }) => sum + missingPairs(ids, judgements).length, 0),
    );
  if (method === 'centroid') {
    const named = new Set(order);
    return counted(
      'place in the order',
      levelsOf(items)
        .flatMap(({ ids }) => ids)
        .filter((id) => !named.has(id)).length,
    );
  }
  if (method === 'points') return null;
  const without = ({ ids }: Siblings): number => ids.filter((id) => !Object.hasOwn(points, id)).length;
  const topless = ({ ids }: Siblings): number => (ids.some((id) => points[id] === FULL_SWING) ? 0 : 1);
  return counted(
    'swing',
    levels.reduce((sum, level) => sum + Math.max(without(level), topless(level)), 0),
  );
}

/** Levels with too many things to compare by pairs. */
export const tooLong = (items: readonly WeighItem[]): Siblings[] =>
  levelsOf(items).filter(({ ids }) => ids.length > MOST_COMPARED);

/** The same points for every criterion and every group. */
export const evenStatement = (items: readonly WeighItem[]): WeightStatement =>
  pointsStatement(
    Object.fromEntries(levelsOf(items).flatMap(({ ids }) => ids.map((id) => [id, MOST_POINTS]))),
  );

/** A statement by another method that says nothing yet; what it says by other methods stays. */
export const emptyStatement = (method: WeightMethod, now: WeightStatement): WeightStatement => ({
  ...now,
  method,
  ...(method === 'swing' ? { points: {} } : {}),
  ...(method === 'pairwise' ? { judgements: [] } : {}),
  ...(method === 'centroid' ? { order: [] } : {}),
});

/**
 * A statement by another method that comes to the present weights: exactly by points and swings, as near as whole
 * judgements or an order come. Null where there are no weights to start from, or a level has too many things.
 */
export function fromPresent(
  method: WeightMethod,
  items: readonly WeighItem[],
  now: WeightStatement,
): WeightStatement | null {
  const { shares, levels } = weighing(items, now);
  if (!shares) return null;
  const weightOf = new Map(
    levels.flatMap(({ ids, weights }) => ids.map((id) => [id, weights?.[id] ?? 0] as const)),
  );
  if (method === 'points') return { ...now, method, points: pointsOfShares(items, shares) };
  if (method === 'swing') {
    const swings = levels.flatMap(({ ids }) => {
      const most = Math.max(...ids.map((id) => weightOf.get(id) ?? 0));
      return ids.map((id) => [id, most === 0 ? 0 : (FULL_SWING * (weightOf.get(id) ?? 0)) / most] as const);
    });
    return { ...now, method, points: Object.fromEntries(swings) };
  }
  if (method === 'centroid') {
    const falling = (ids: readonly string[]): string[] =>
      [...ids].sort((a, b) => (weightOf.get(b) ?? 0) - (weightOf.get(a) ?? 0));
    return { ...now, method, order: levels.flatMap(({ ids }) => falling(ids)) };
  }
  const unweighed = [...weightOf.values()].some((weight) => weight === 0);
  if (unweighed || tooLong(items).length > 0) return null;
  const judgements = levels.flatMap(({ ids }) =>
    ids.flatMap((a, place) =>
      ids
        .slice(place + 1)
        .map((b): [string, string, number] => [
          a,
          b,
          wholeRatio((weightOf.get(a) ?? 1) / (weightOf.get(b) ?? 1)),
        ]),
    ),
  );
  return { ...now, method, judgements };
}

/** The nearest of 9, 8 … 1 … 1/8, 1/9. */
function wholeRatio(ratio: number): number {
  const whole = (times: number): number => Math.min(MOST_RATIO, Math.max(1, Math.round(times)));
  return ratio >= 1 ? whole(ratio) : 1 / whole(1 / ratio);
}

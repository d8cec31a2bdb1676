import { judgedIds, missingPairs } from './judgements.ts';
import {
  levelsOf,
  type Judgement,
  type Siblings,
  type WeighItem,
  type WeightStatement,
} from './statement.ts';
import { FULL_SWING } from './swing.ts';

/**
 * A statement as it still holds for the criteria that stand now, so that `weigh` takes it: criteria may have been
 * removed, added, or moved between groups since. The largest swing of each level is raised to 100 and the others with
 * it; of judgements the largest set of a level that compares every pair stays, the first of equals; what that leaves
 * out is unjudged again. Points and orders hold as they are.
 */
export function settled(items: readonly WeighItem[], statement: WeightStatement): WeightStatement {
  const levels = levelsOf(items);
  if (statement.method === 'swing') return { ...statement, points: raised(levels, statement.points) };
  if (statement.method === 'pairwise')
    return { ...statement, judgements: complete(levels, statement.judgements) };
  return statement;
}

function raised(levels: readonly Siblings[], points: WeightStatement['points']): WeightStatement['points'] {
  const changed = levels.flatMap(({ ids }) => {
    const largest = Math.max(0, ...ids.map((id) => points[id] ?? 0));
    if (largest === 0 || largest === FULL_SWING) return [];
    const judged = ids.filter((id) => Object.hasOwn(points, id));
    return judged.map((id): [string, number] => [id, ((points[id] ?? 0) / largest) * FULL_SWING]);
  });
  return { ...points, ...Object.fromEntries(changed) };
}

function complete(levels: readonly Siblings[], judgements: readonly Judgement[]): Judgement[] {
  const all = new Set(levels.flatMap(({ ids }) => ids));
  const kept = new Set(
    levels.flatMap(({ ids }) => largestComplete(judgedIds(ids, judgements, all), judgements)),
  );
  return judgements.filter(([a, b]) => [a, b].every((id) => kept.has(id) || !all.has(id)));
}

/**
 * Levels that were complete and are now one are complete sets side by side; growing a set from each id finds the
 * largest of those.
 */
function largestComplete(ids: readonly string[], judgements: readonly Judgement[]): string[] {
  const gaps = new Set(missingPairs(ids, judgements).flatMap(([a, b]) => [`${a} ${b}`, `${b} ${a}`]));
  let largest: string[] = [];
  for (const start of ids) {
    const grown = [start];
    for (const id of ids) {
      if (id !== start && grown.every((other) => !gaps.has(`${id} ${other}`))) grown.push(id);
    }
    if (grown.length > largest.length) largest = grown;
  }
  // Several, no two of them comparable: none stands out.
  return largest.length === 1 && ids.length > 1 ? [] : largest;
}

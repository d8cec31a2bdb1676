import type { WeightStatement } from '#contract/weights.ts';

interface Named {
  id: string;
  name: string;
}

/** What a weight is said of: a criterion or a group, by name; null where it has been removed since. */
type Weighed = { criterion: string } | { group: string } | null;

const text = (value: unknown): string => JSON.stringify(value);
const inOrder = <T>(list: T[]): T[] => list.sort((a, b) => (text(a) < text(b) ? -1 : 1));

/**
 * The statement the study's weights follow from, by names instead of ids, and only what its method reads: points and
 * swing the points, rank-order centroid the order, pairwise the judgements.
 */
export function weightsByName(
  { method, points, order, judgements }: WeightStatement,
  { criteria, groups }: { criteria: readonly Named[]; groups: readonly Named[] },
) {
  const known = new Map<string, Weighed>([
    ...criteria.map(({ id, name }): [string, Weighed] => [id, { criterion: name }]),
    ...groups.map(({ id, name }): [string, Weighed] => [id, { group: name }]),
  ]);
  const of = (id: string): Weighed => known.get(id) ?? null;
  if (method === 'centroid') return { method, order: order.map(of) };
  if (method === 'pairwise')
    return {
      method,
      judgements: inOrder(judgements.map(([a, b, times]) => ({ of: of(a), against: of(b), times }))),
    };
  const given = Object.entries(points).map(([id, number]) => ({ of: of(id), points: number }));
  return { method, points: inOrder(given) };
}

import type { ValueTable } from './overall.ts';

/**
 * Pareto dominance: a site dominates another when it is at least as good on every criterion and better on one.
 * @param table values, more is better; weights play no part.
 * @returns by site, the sites that dominate it, in the order of the table.
 * @see references.ts `keeneyRaiffa`; checked by definition in tests/core/decision/dominance.test.ts
 */
export function dominators(table: ValueTable): number[][] {
  const sites = Array.from({ length: table.siteCount }, (_, site) => site);
  return sites.map((site) => sites.filter((other) => dominates(table, other, site)));
}

/**
 * For each site one that dominates it: the first along an order of those that nobody dominates, which is enough, for
 * whatever dominates a dominator dominates the site too.
 * @param table values, more is better.
 * @param order sites, such as the ranked ones from the best; only these are compared.
 * @returns by site of the table, null where none of the order dominates it.
 * @see references.ts `keeneyRaiffa`; checked beside `dominators` in tests/core/decision/dominance.test.ts
 */
export function firstDominators(table: ValueTable, order: ArrayLike<number>): (number | null)[] {
  const undominated: number[] = [];
  for (const site of dominatorsFirst(table, order)) {
    if (firstOf(table, undominated, site) === null) undominated.push(site);
  }
  const free = new Set(undominated);
  const inOrder = Array.from(order).filter((site) => free.has(site));
  const first = Array.from<unknown, number | null>({ length: table.siteCount }, () => null);
  for (const site of Array.from(order)) {
    if (!free.has(site)) first[site] = firstOf(table, inOrder, site);
  }
  return first;
}

function firstOf(table: ValueTable, among: readonly number[], site: number): number | null {
  const { criterionCount, values } = table;
  // Most others fall short where the site is strongest: one look rules them out.
  const own = values.subarray(site * criterionCount, (site + 1) * criterionCount);
  const strength = own.reduce((most, v) => Math.max(most, v), 0);
  const strongest = Math.max(0, own.indexOf(strength));
  for (const other of among) {
    if ((values[other * criterionCount + strongest] ?? 0) < strength) continue;
    if (dominates(table, other, site)) return other;
  }
  return null;
}

/** By the sum of values and, where rounding makes two alike, by the first value that differs: a dominator has more of both. */
function dominatorsFirst(
  { siteCount, criterionCount, values }: ValueTable,
  order: ArrayLike<number>,
): number[] {
  const sums = Float64Array.from({ length: siteCount }, (_, site) =>
    values.subarray(site * criterionCount, (site + 1) * criterionCount).reduce((sum, v) => sum + v, 0),
  );
  const firstDifference = (a: number, b: number): number => {
    for (let j = 0; j < criterionCount; j++) {
      const gain = (values[b * criterionCount + j] ?? 0) - (values[a * criterionCount + j] ?? 0);
      if (gain !== 0) return gain;
    }
    return 0;
  };
  return Array.from(order).sort((a, b) => (sums[b] ?? 0) - (sums[a] ?? 0) || firstDifference(a, b));
}

function dominates({ criterionCount, values }: ValueTable, better: number, worse: number): boolean {
  let ahead = false;
  for (let j = 0; j < criterionCount; j++) {
    const gain = (values[better * criterionCount + j] ?? 0) - (values[worse * criterionCount + j] ?? 0);
    if (gain < 0) return false;
    if (gain > 0) ahead = true;
  }
  return ahead;
}

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

function dominates({ criterionCount, values }: ValueTable, better: number, worse: number): boolean {
  let ahead = false;
  for (let j = 0; j < criterionCount; j++) {
    const gain = (values[better * criterionCount + j] ?? 0) - (values[worse * criterionCount + j] ?? 0);
    if (gain < 0) return false;
    if (gain > 0) ahead = true;
  }
  return ahead;
}

import type { ValueTable } from './overall.ts';

/**
 * The non-dominated edge of two criteria: the sites that no other beats on one of them without losing on the other.
 * @param table values, more is better.
 * @param across place of the first criterion.
 * @param up place of the second.
 * @returns sites from the best on `across` to the best on `up`; sites alike on both stand side by side.
 * @throws RangeError when a criterion is none of the table's.
 * @see references.ts `keeneyRaiffa`; checked by definition in tests/core/decision/edge.test.ts
 */
export function edgeOf(
  { siteCount, criterionCount, values }: ValueTable,
  across: number,
  up: number,
): number[] {
  const wrong = [across, up].find((j) => !Number.isInteger(j) || j < 0 || j >= criterionCount);
  if (wrong !== undefined) throw new RangeError(`edgeOf: criterion ${wrong} of ${criterionCount}`);
  const x = (site: number): number => values[site * criterionCount + across] ?? 0;
  const y = (site: number): number => values[site * criterionCount + up] ?? 0;
  const sites = Array.from({ length: siteCount }, (_, site) => site);
  sites.sort((a, b) => x(b) - x(a) || y(b) - y(a) || a - b);
  let last = -1;
  return sites.filter((site) => {
    const onEdge = last < 0 || y(site) > y(last) || (y(site) === y(last) && x(site) === x(last));
    if (onEdge) last = site;
    return onEdge;
  });
}

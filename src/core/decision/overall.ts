import type { Prepared } from './prepare.ts';

/** Values of sites × criteria, row by row, every one of them known. */
export interface ValueTable {
  siteCount: number;
  criterionCount: number;
  /** 0…1: the value of site s under criterion c stands at s × criterionCount + c. */
  values: Float64Array;
}

/**
 * Additive overall value V = Σ w_j v_j of one site.
 * @param weights w, one a criterion.
 * @param values v, row by row.
 * @param from where the site's row begins.
 * @see references.ts `keeneyRaiffa`
 */
export function overallValue(weights: Float64Array, values: Float64Array, from: number): number {
  let total = 0;
  for (let j = 0; j < weights.length; j++) total += (weights[j] ?? 0) * (values[from + j] ?? 0);
  return total;
}

/** Additive overall value of every site, in the order of the table. */
export function overallValues({ siteCount, criterionCount, values }: ValueTable, weights: Float64Array) {
  return Float64Array.from({ length: siteCount }, (_, site) =>
    overallValue(weights, values, site * criterionCount),
  );
}

/**
 * The values of what `prepare` made, for methods that compare sites criterion by criterion.
 * @throws RangeError when a site misses a figure: those methods know no gaps.
 */
export function completeValues({ table, values, gaps }: Prepared): ValueTable {
  const gap = gaps.indexOf(1);
  if (gap >= 0) throw new RangeError(`completeValues: site ${gap} misses a figure`);
  return { siteCount: table.siteCount, criterionCount: table.criterionCount, values };
}

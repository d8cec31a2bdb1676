import type { Prepared } from './prepare.ts';
import { termOf } from './rank.ts';

/** What one criterion adds to the difference of two sites. */
export interface Contrast {
  criterion: number;
  /** The terms w v of the two sites. */
  first: number;
  second: number;
  /** `first` less `second`; what is above 0 speaks for the first site. */
  difference: number;
}

/**
 * Two sites criterion by criterion, what makes the difference first: the differences of their terms add up to that of
 * their overall values. A missing figure counts 0, as in `rank`'s totals.
 * @param weights one a criterion, summing to 1.
 * @returns one a criterion, by falling size of the difference; equal ones in the order of the criteria.
 * @throws RangeError when a site is none of the table's.
 * @see references.ts `keeneyRaiffa`; checked by hand in tests/core/decision/head-to-head.test.ts
 */
export function headToHead(prepared: Prepared, weights: Float64Array, a: number, b: number): Contrast[] {
  const { siteCount } = prepared.table;
  const wrong = [a, b].find((site) => !Number.isInteger(site) || site < 0 || site >= siteCount);
  if (wrong !== undefined) throw new RangeError(`headToHead: site ${wrong} of ${siteCount}`);
  const contrasts = Array.from(weights, (_, criterion): Contrast => {
    const first = termOf(prepared, weights, a, criterion);
    const second = termOf(prepared, weights, b, criterion);
    return { criterion, first, second, difference: first - second };
  });
  return contrasts.sort(
    (one, other) => Math.abs(other.difference) - Math.abs(one.difference) || one.criterion - other.criterion,
  );
}

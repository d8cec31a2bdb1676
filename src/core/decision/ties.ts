/** Overall values this close share a rank. */
export const TIE = 1e-12;

/**
 * Where a run of tied figures ends. Ties are measured from the first of the run, so that a long run of near-ties
 * cannot creep.
 * @param sorted figures in order, rising or falling.
 * @param first place of the run's first figure.
 * @returns the place after the run's last figure.
 */
export function endOfTie(sorted: ArrayLike<number>, first: number): number {
  const lead = sorted[first] ?? 0;
  let end = first + 1;
  while (end < sorted.length && Math.abs(lead - (sorted[end] ?? 0)) <= TIE) end++;
  return end;
}

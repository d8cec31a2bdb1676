/** One printed sum: the parts that stand beside their total. A difference is its larger term as the total. */
export interface PrintedSum {
  parts: readonly number[];
  total: number;
}

/** Sums as they are to be printed: every number is already a multiple of 10^−decimals. */
export interface ClosedSums {
  decimals: number;
  sums: { parts: number[]; total: number }[];
  /** Whether a part stands one step of its last digit away from plain rounding, so that the column can say so. */
  adjusted: boolean;
}

/** The figure in steps of its last printed digit, by the same rounding that prints it. */
const steps = (value: number, decimals: number): number =>
  Math.round(Number(value.toFixed(decimals)) * 10 ** decimals);

/** Whether the printed total is the sum of the printed parts at so many decimals. */
export function closes({ parts, total }: PrintedSum, decimals: number): boolean {
  return parts.reduce((sum, part) => sum + steps(part, decimals), 0) === steps(total, decimals);
}

/**
 * The fewest decimals, from least to most, at which every sum closes by plain rounding.
 * @returns undefined where none of them does.
 */
export function closingDecimals(
  sums: readonly PrintedSum[],
  least: number,
  most: number,
): number | undefined {
  for (let decimals = least; decimals <= most; decimals++) {
    if (sums.every((sum) => closes(sum, decimals))) return decimals;
  }
  return undefined;
}

/**
 * Rounds the parts so that they add up to the rounded total: each part is rounded plainly, then those that lost (or
 * gained) most by it are moved one step, as many as the sum is off. A part that is exact in its digits never moves
 * and none ends a whole step away from its figure. Published as the method of largest remainders (Hamilton).
 */
function apportioned({ parts, total }: PrintedSum, decimals: number): number[] {
  const rounded = parts.map((part) => steps(part, decimals));
  const off = steps(total, decimals) - rounded.reduce((sum, part) => sum + part, 0);
  const step = Math.sign(off);
  const lost = parts.map((part, at) => step * (part * 10 ** decimals - (rounded[at] ?? 0)));
  const order = [...lost.keys()].sort((a, b) => (lost[b] ?? 0) - (lost[a] ?? 0) || a - b);
  for (const at of order.slice(0, Math.abs(off))) rounded[at] = (rounded[at] ?? 0) + step;
  return rounded;
}

/**
 * The rounding rule of every printed table: a sum must come out from the digits beside it. If plain rounding does not
 * close at the least decimals, one more digit is printed on all; where a long table still doesn't, the parts (never
 * the total) are rounded to close at that digit, and `adjusted` says so.
 * @param sums what the column pairs: every row's parts and total, each total within half a step of its parts' sum.
 * @param least decimals wanted; most: decimals at which parts give way, by default one more.
 * @returns the figures to print; each part lies less than one step of its last digit from the true one.
 * @throws RangeError when a total is not the sum of its parts.
 */
export function closedSums(sums: readonly PrintedSum[], least: number, most = least + 1): ClosedSums {
  for (const { parts, total } of sums) {
    const sum = parts.reduce((so, part) => so + part, 0);
    if (!(Math.abs(sum - total) < 0.5 / 10 ** most))
      throw new RangeError(`total: ${total} is not the sum of its parts, ${sum}`);
  }
  const plain = closingDecimals(sums, least, most);
  const decimals = plain ?? most;
  const scale = 10 ** decimals;
  return {
    decimals,
    adjusted: plain === undefined,
    sums: sums.map((sum) => ({
      parts: apportioned(sum, decimals).map((part) => part / scale),
      total: steps(sum.total, decimals) / scale,
    })),
  };
}

/** A printed total whose parts count with factors, such as flights a year × payload. */
export interface WeightedSum extends PrintedSum {
  factors: readonly number[];
}

/**
 * The fewest decimals of the parts at which a reader who weighs and adds what is printed comes to the printed totals.
 * @param totalDecimals digits the totals are printed to, coarser than the parts.
 * @returns a count from least to most; most where none closes.
 */
export function weightedDecimals(
  sums: readonly WeightedSum[],
  totalDecimals: number,
  least: number,
  most: number,
): number {
  const comesOut = ({ parts, factors, total }: WeightedSum, decimals: number): boolean => {
    const sum = parts.reduce((so, part, at) => so + Number(part.toFixed(decimals)) * (factors[at] ?? 0), 0);
    return steps(sum, totalDecimals) === steps(total, totalDecimals);
  };
  for (let decimals = least; decimals < most; decimals++) {
    if (sums.every((sum) => comesOut(sum, decimals))) return decimals;
  }
  return most;
}

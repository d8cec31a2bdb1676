import type { ValueTable } from './overall.ts';

/**
 * Closeness to the ideal (TOPSIS): r = v/√Σv² down each column, times the weight; S⁺ and S⁻ are the distances to the
 * best and the worst of each column, C = S⁻/(S⁺ + S⁻). A column of zeros stays zero.
 * @param table values, more is better.
 * @param weights one a criterion, summing to 1.
 * @returns 0…1 by site; 0.5 where the ideal and the anti-ideal are one.
 * @see references.ts `hwangYoon`; checked by tests/reference/decision-topsis.csv
 */
export function closeness(table: ValueTable, weights: Float64Array): Float64Array {
  const { siteCount, criterionCount, values } = table;
  const toIdeal = new Float64Array(siteCount);
  const toAntiIdeal = new Float64Array(siteCount);
  for (let j = 0; j < criterionCount; j++) {
    const column = Float64Array.from({ length: siteCount }, (_, s) => values[s * criterionCount + j] ?? 0);
    const length = Math.sqrt(column.reduce((sum, v) => sum + v * v, 0));
    if (length === 0) continue;
    const scaled = column.map((v) => ((weights[j] ?? 0) * v) / length);
    const [worst, best] = extremesOf(scaled);
    scaled.forEach((x, site) => {
      toIdeal[site] = (toIdeal[site] ?? 0) + (best - x) ** 2;
      toAntiIdeal[site] = (toAntiIdeal[site] ?? 0) + (x - worst) ** 2;
    });
  }
  return toIdeal.map((square, site) => {
    const [plus, minus] = [Math.sqrt(square), Math.sqrt(toAntiIdeal[site] ?? 0)];
    return plus + minus === 0 ? 0.5 : minus / (plus + minus);
  });
}

function extremesOf(column: Float64Array): [number, number] {
  let [lowest, highest] = [Infinity, -Infinity];
  for (const x of column) {
    if (x < lowest) lowest = x;
    if (x > highest) highest = x;
  }
  return [lowest, highest];
}

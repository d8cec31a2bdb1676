/**
 * A figure as it stands in tables and sentences: fixed decimals, a comma each three digits, a true minus.
 * Exactly zero is "0" whatever the decimals, so that it differs from a figure that only rounds to it.
 * @param value any finite number.
 * @param decimals digits after the point, 0 to 12.
 * @returns for example "−1,234.5"; negative figures that round to nothing lose their sign.
 * @throws RangeError when the value is not finite: no such figure may be printed.
 */
export function printedFigure(value: number, decimals: number): string {
  if (!Number.isFinite(value)) throw new RangeError(`value: ${value} is not a finite figure`);
  if (value === 0) return '0';
  const [whole = '', fraction] = Math.abs(value).toFixed(decimals).split('.');
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, ',') + (fraction === undefined ? '' : `.${fraction}`);
  return value < 0 && /[1-9]/.test(grouped) ? `−${grouped}` : grouped;
}

/**
 * The least decimals that print every figure in full, up to a most: 12.5 and 3 need one.
 * @param figures the column's figures; none give 0.
 * @param most where the search ends, 3 by default.
 */
export function decimalsNeeded(figures: readonly number[], most = 3): number {
  for (let decimals = 0; decimals < most; decimals++) {
    if (figures.every((figure) => Number(figure.toFixed(decimals)) === figure)) return decimals;
  }
  return most;
}

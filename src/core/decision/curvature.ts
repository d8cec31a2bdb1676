/**
 * The curvature of the exponential value function that has a given value half way between the levels:
 * v(½) = (1 − e^(−c/2))/(1 − e^(−c)) = 1/(1 + e^(−c/2)), so c = 2 ln(m/(1 − m)).
 * For drawing and dragging alone: weighing computes from a curvature, never towards one.
 * @param middle m, above 0 and below 1; ½ is straight.
 * @throws RangeError when the value is 0 or less, or 1 or more: no curvature reaches it.
 * @see references.ts `keeneyRaiffa`; checked against `shareOfExponential` in tests/core/decision/curvature.test.ts
 */
export function curvatureThrough(middle: number): number {
  if (!(middle > 0 && middle < 1)) throw new RangeError(`curvatureThrough: ${middle} is not between 0 and 1`);
  return 2 * Math.log(middle / (1 - middle));
}

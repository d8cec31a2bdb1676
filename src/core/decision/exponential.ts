/** Above this e^(−x) is below half a unit in the last place of 1. */
const SPENT = 40;
const SMALL = 1 / 16;
/** Terms of the series that count below SMALL: SMALL^10/11! is under 1e-19. */
const TERMS = 10;

/**
 * 1 − e^(−x) for x ≥ 0, by + − × ÷ alone, so that it is the same to the last digit on every machine; `Math.exp` is not.
 * The argument is halved until the series is short, then E(2y) = E(y)(2 − E(y)) doubles it back without cancellation.
 */
function oneMinusExp(x: number): number {
  if (x >= SPENT) return 1;
  let y = x;
  let halvings = 0;
  for (; y > SMALL; halvings++) y /= 2;
  let series = 1;
  for (let k = TERMS; k >= 2; k--) series = 1 - (y / k) * series;
  let result = y * series;
  for (; halvings > 0; halvings--) result *= 2 - result;
  return result;
}

/**
 * The exponential value function (1 − e^(−c s))/(1 − e^(−c)).
 * @param s 0…1, from the worst level to the best.
 * @param c curvature; 0 is straight. For a negative c the curve of −c is turned half round: 1 − v(1 − s).
 * @returns 0 at s = 0, 1 at s = 1.
 * @see references.ts `keeneyRaiffa`; checked beside `Math.expm1` in tests/core/decision/shape.test.ts
 */
export function shareOfExponential(s: number, c: number): number {
  if (c < 0) return 1 - shareOfExponential(1 - s, -c);
  const whole = oneMinusExp(c);
  // A curvature too small to bend anything, 0 among them: the ratio of the two tends to s.
  return whole < Number.MIN_VALUE * 2 ** 53 ? s : oneMinusExp(c * s) / whole;
}

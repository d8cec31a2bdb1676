import { ConvergenceError } from '../convergence-error.ts';

const MOST_STEPS = 100;

/**
 * Root of a function between two points where its signs differ, by Brent's method: inverse quadratic or secant steps
 * where they shrink the bracket fast enough, halving where they do not.
 * @param atLow f(low) and @param atHigh f(high), of opposite sign or zero
 * @param tolerance on the root
 * @throws RangeError where the signs are the same, ConvergenceError after 100 steps
 * @see references.brent
 */
export function rootBetween(
  f: (x: number) => number,
  low: number,
  high: number,
  atLow: number,
  atHigh: number,
  tolerance: number,
): number {
  if (atLow * atHigh > 0) throw new RangeError(`rootBetween: f has one sign at ${low} and ${high}`);
  let a = low;
  let b = high;
  let fa = atLow;
  let fb = atHigh;
  let c = b;
  let fc = fb;
  let step = b - a;
  let last = step;
  for (let k = 0; k < MOST_STEPS; k++) {
    if (fb * fc > 0) {
      c = a;
      fc = fa;
      last = step = b - a;
    }
    if (Math.abs(fc) < Math.abs(fb)) {
      a = b;
      b = c;
      c = a;
      fa = fb;
      fb = fc;
      fc = fa;
    }
    const near = 2 * Number.EPSILON * Math.abs(b) + tolerance / 2;
    const half = (c - b) / 2;
    if (Math.abs(half) <= near || fb === 0) return b;
    let p = half;
    let q = 1;
    if (Math.abs(last) >= near && Math.abs(fa) > Math.abs(fb)) {
      const s = fb / fa;
      if (a === c) {
        p = 2 * half * s;
        q = 1 - s;
      } else {
        const r = fb / fc;
        const t = fa / fc;
        p = s * (2 * half * t * (t - r) - (b - a) * (r - 1));
        q = (t - 1) * (r - 1) * (s - 1);
      }
      if (p > 0) q = -q;
      else p = -p;
    }
    if (q !== 1 && 2 * p < Math.min(3 * half * q - Math.abs(near * q), Math.abs(last * q))) {
      last = step;
      step = p / q;
    } else {
      last = step = half;
    }
    a = b;
    fa = fb;
    b += Math.abs(step) > near ? step : Math.sign(half) * near;
    fb = f(b);
  }
  throw new ConvergenceError('rootBetween', MOST_STEPS, fb);
}

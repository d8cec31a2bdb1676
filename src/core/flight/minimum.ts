const GOLDEN = (3 - Math.sqrt(5)) / 2;

/** The least of a function and where it lies. */
export interface Least {
  readonly at: number;
  readonly value: number;
}

/** Golden-section search with parabolic steps in a bracket that holds one valley. @see references.brent, chapter 5 */
function valley(f: (x: number) => number, low: number, high: number, tolerance: number): Least {
  let a = low;
  let b = high;
  // The lowest place so far, the second lowest, and the second lowest before that.
  let x = a + GOLDEN * (b - a);
  let w = x;
  let v = x;
  let fx = f(x);
  let fw = fx;
  let fv = fx;
  let step = 0;
  let last = 0;
  for (let round = 0; round < 100; round++) {
    const middle = (a + b) / 2;
    if (Math.abs(x - middle) <= 2 * tolerance - (b - a) / 2) break;
    const r = (x - w) * (fx - fv);
    const q = (x - v) * (fx - fw);
    const bottom = 2 * (q - r);
    const move = ((x - v) * q - (x - w) * r) / -bottom;
    if (x + move > a && x + move < b && Math.abs(move) < Math.abs(last / 2)) {
      last = step;
      step = move;
    } else {
      last = (x < middle ? b : a) - x;
      step = GOLDEN * last;
    }
    const u = x + (Math.abs(step) >= tolerance ? step : Math.sign(step) * tolerance);
    const fu = f(u);
    if (fu <= fx) {
      if (u < x) b = x;
      else a = x;
      v = w;
      fv = fw;
      w = x;
      fw = fx;
      x = u;
      fx = fu;
      continue;
    }
    if (u < x) a = u;
    else b = u;
    if (fu <= fw || w === x) {
      v = w;
      fv = fw;
      w = u;
      fw = fu;
    } else if (fu <= fv || v === x || v === w) {
      v = u;
      fv = fu;
    }
  }
  return { at: x, value: fx };
}

/**
 * The least of a function over [low, high], ends included: a grid finds the valley, a bracketed search its floor.
 * @param intervals of the grid; two valleys closer than an interval count as one
 */
export function leastOver(
  f: (x: number) => number,
  low: number,
  high: number,
  intervals: number,
  tolerance: number,
): Least {
  let best: Least = { at: low, value: f(low) };
  let index = 0;
  const step = (high - low) / intervals;
  for (let k = 1; k <= intervals; k++) {
    const at = k === intervals ? high : low + k * step;
    const value = f(at);
    if (value < best.value) {
      best = { at, value };
      index = k;
    }
  }
  const left = low + Math.max(index - 1, 0) * step;
  const right = low + Math.min(index + 1, intervals) * step;
  const floor = valley(f, left, right, tolerance);
  return floor.value < best.value ? floor : best;
}

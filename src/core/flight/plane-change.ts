import { metresPerSecond } from '../units.ts';
import type { MetresPerSecond } from '../units.ts';

/** A burn that changes speed and may turn the velocity: the vector difference of two speeds. */
export interface Burn {
  readonly before: number;
  readonly after: number;
  /** v₁² + v₂² and 2 v₁ v₂, of √(v₁² + v₂² − 2 v₁ v₂ cos x). */
  readonly squares: number;
  readonly product: number;
  /** The turn up to which the cost curves upwards, cos x = min/max of the two speeds. */
  readonly inflection: number;
}

export function burnOf(before: number, after: number): Burn {
  return {
    before,
    after,
    squares: before * before + after * after,
    product: 2 * before * after,
    inflection: Math.acos(Math.min(before, after) / Math.max(before, after)),
  };
}

/** Cost of a burn that also turns the velocity by `angle`; written so that small turns keep their digits. */
export function costOf({ before, after, product }: Burn, angle: number): MetresPerSecond {
  const half = Math.sin(angle / 2);
  const step = after - before;
  return metresPerSecond(Math.sqrt(step * step + 2 * product * half * half));
}

/** Plane change alone at one speed, 2 v sin(Δ/2). @see references.planeChange, tests/reference/plane-change.csv */
export function simplePlaneChange(speed: number, angle: number): MetresPerSecond {
  return metresPerSecond(2 * speed * Math.sin(angle / 2));
}

/** d cost / d angle. */
function slopeOf(burn: Burn, angle: number): number {
  const cost = costOf(burn, angle);
  // Equal speeds leave a corner at no turn; the slope to its right is v.
  return cost === 0 ? burn.before : (burn.product * Math.sin(angle)) / (2 * cost);
}

/** d² cost / d angle². */
function curvatureOf({ squares, product }: Burn, angle: number, cost: number): number {
  const cosine = Math.cos(angle);
  return (product * (2 * squares * cosine - product - product * cosine * cosine)) / (4 * cost * cost * cost);
}

const TOLERANCE = 1e-9;

/** Newton's method for the slope's zero between `low` (slope ≤ 0) and `high` (slope ≥ 0), kept inside by halving. */
function flatSpot(first: Burn, second: Burn, change: number, low: number, high: number): number {
  let a = low;
  let b = high;
  let x = (a + b) / 2;
  for (let step = 0; step < 100 && b - a > TOLERANCE; step++) {
    const one = costOf(first, x);
    const two = costOf(second, change - x);
    const slope =
      (first.product * Math.sin(x)) / (2 * one) - (second.product * Math.sin(change - x)) / (2 * two);
    if (slope < 0) a = x;
    else b = x;
    const next = x - slope / (curvatureOf(first, x, one) + curvatureOf(second, change - x, two));
    const move = next > a && next < b ? Math.abs(next - x) : Infinity;
    x = move < Infinity ? next : (a + b) / 2;
    if (move < TOLERANCE) break;
  }
  return x;
}

/**
 * The share of a plane change made at the first of two burns so that their sum is least.
 *
 * Each burn's cost curves upwards up to its inflection and downwards beyond, so a least inside lies where at least one
 * of them curves upwards. Between the inflections the slope crosses zero at most once from below; the two ends are
 * compared as well, because the sum need not have one valley only.
 * @param change Δ, 0…π
 * @returns α, 0…Δ
 * @see references.planeChange, tests/reference/plane-change.csv
 */
export function bestSplit(first: Burn, second: Burn, change: number): number {
  let best = 0;
  let least = costOf(first, 0) + costOf(second, change);
  const consider = (share: number) => {
    const sum = costOf(first, share) + costOf(second, change - share);
    if (sum < least) {
      least = sum;
      best = share;
    }
  };
  consider(change);
  const search = (low: number, high: number) => {
    if (slopeOf(first, low) - slopeOf(second, change - low) > 0) return;
    if (slopeOf(first, high) - slopeOf(second, change - high) < 0) return;
    consider(flatSpot(first, second, change, low, high));
  };
  // Up to `turns` the first burn's cost curves upwards, from `rises` on the second's does.
  const turns = Math.min(first.inflection, change);
  const rises = Math.max(change - second.inflection, 0);
  search(0, Math.min(turns, rises));
  if (rises < turns) search(rises, turns);
  search(Math.max(turns, rises), change);
  return best;
}

/** Sum of two burns that share a plane change as well as can be. */
export function sharedPlaneChange(first: Burn, second: Burn, change: number): MetresPerSecond {
  const share = bestSplit(first, second, change);
  return metresPerSecond(costOf(first, share) + costOf(second, change - share));
}

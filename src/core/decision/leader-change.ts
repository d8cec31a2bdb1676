import { overallValues, type ValueTable } from './overall.ts';
import { TIE } from './ties.ts';

/** The weight of a criterion at which another site takes or joins the lead. */
export interface Change {
  /** 0…1. */
  weight: number;
  /** Place of the new leader in the table. */
  leader: number;
}

/** The nearest changes of leader when one weight is moved; null where none comes before 0 or 1. */
export interface LeaderChange {
  below: Change | null;
  above: Change | null;
}

/**
 * For each criterion the weight at which the leader changes while the other weights keep their proportions, in closed
 * form. With the weight w of criterion k, V = w v_k + (1 − w) R, R the mean of the other values by the other weights
 * (equally where those are all 0), so a rival's lag g at the weight w₀ closes at w₀ − g/slope, slope = Δv_k − ΔR.
 * A tie now is a change at distance 0, on the side where the rival pulls ahead, or on both where they stay level.
 * @param table values of at least one site.
 * @param weights one a criterion, summing to 1.
 * @param leader place of the site that leads now.
 * @returns by criterion; one criterion alone has nothing to trade with and no change.
 * @see references.ts `keeneyRaiffa`; checked by evaluation on both sides in tests/core/decision/leader-change.test.ts
 */
export function leaderChanges(table: ValueTable, weights: Float64Array, leader: number): LeaderChange[] {
  const totals = overallValues(table, weights);
  const lags = totals.map((total) => (totals[leader] ?? 0) - total);
  return Array.from(weights, (weight, criterion) => {
    const rest = restOf(table, weights, criterion);
    const change: LeaderChange = { below: null, above: null };
    if (weights.length < 2) return change;
    const lead = (site: number): number =>
      (table.values[site * table.criterionCount + criterion] ?? 0) - (rest[site] ?? 0);
    const below: Nearest = { distance: weight, speed: 0, leader: -1 };
    const above: Nearest = { distance: 1 - weight, speed: 0, leader: -1 };
    lags.forEach((lag, site) => {
      if (site === leader) return;
      const slope = lead(leader) - lead(site);
      if (slope > -TIE) nearer(below, lag, slope, site);
      if (slope < TIE) nearer(above, lag, -slope, site);
    });
    if (below.leader >= 0) change.below = { weight: weight - below.distance, leader: below.leader };
    if (above.leader >= 0) change.above = { weight: weight + above.distance, leader: above.leader };
    return change;
  });
}

/** The nearest change so far on one side. */
interface Nearest {
  /** How far the weight has to move. */
  distance: number;
  /** How fast the new leader pulls ahead there. */
  speed: number;
  /** -1 where there is none: `distance` is then the way to the end, where nothing lies beyond. */
  leader: number;
}

/** Takes a rival that closes its lag sooner, or at the same weight and faster. */
function nearer(nearest: Nearest, lag: number, speed: number, site: number): void {
  const distance = lag <= TIE ? 0 : speed > 0 ? lag / speed : Infinity;
  const sooner = distance < nearest.distance - TIE;
  const together = nearest.leader >= 0 && distance <= nearest.distance + TIE;
  if (!sooner && !(together && speed > nearest.speed + TIE)) return;
  nearest.distance = Math.min(distance, nearest.distance);
  nearest.speed = speed;
  nearest.leader = site;
}

/** Mean value of each site over the other criteria, by their weights, or equally where those are all 0. */
function restOf(table: ValueTable, weights: Float64Array, criterion: number): Float64Array {
  const others = weights.map((w, j) => (j === criterion ? 0 : w));
  const sum = others.reduce((total, w) => total + w, 0);
  const shares = others.map((w, j) => (sum > 0 ? w / sum : j === criterion ? 0 : 1 / (weights.length - 1)));
  return overallValues(table, shares);
}

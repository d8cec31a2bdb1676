import { NAUTICAL_MILE } from './vehicle-class.ts';

/** The probability of failure and the time at risk that appendix C prescribes. */
export const FAILURE_PROBABILITY = 0.1;
export const FLIGHT_SECONDS = 643;

/** Table C-2: how fast the impact point runs, by its range: up to so many nautical miles, so many a second. */
const IMPACT_RATES: readonly (readonly [number, number])[] = [
  [75, 0.75],
  [300, 1.73],
  [900, 4.25],
  [1700, 8.85],
  [2600, 19.75],
  [3500, 42.45],
  [4500, 84.85],
  [5250, 154.95],
];

/** Rate of the impact point at a range, m/s. @throws RangeError beyond 5,250 nautical miles */
export function impactRate(range: number): number {
  const found = IMPACT_RATES.find(([miles]) => range <= miles * NAUTICAL_MILE);
  if (!found) throw new RangeError(`impactRate: range of ${range} m`);
  return found[1] * NAUTICAL_MILE;
}

/** A rectangle in strip coordinates: from x1 to x2 along the flight line, from y1 to y2 square to it, m. */
export interface Rectangle {
  readonly x1: number;
  readonly x2: number;
  readonly y1: number;
  readonly y2: number;
}

/** Every step of the probability that an impact point falls into a rectangle. */
export interface ImpactSteps {
  /** y₁, the middle and y₂ as shares of σ. */
  readonly edges: readonly [number, number, number];
  /** e^(−u²/2) at each. */
  readonly bells: readonly [number, number, number];
  /** Share of impacts between y₁ and y₂, by Simpson's rule. */
  readonly across: number;
  /** How long the impact point dwells between x₁ and x₂, s. */
  readonly dwell: number;
  readonly probability: number;
}

/**
 * Probability that a failing vehicle's impact point falls into a rectangle, step by step: normal across the flight
 * line, by Simpson's rule over the rectangle's width, and along it as long as the impact point dwells there:
 * P = |y₂ − y₁|/σ /(6√(2π)) [e^(−(y₁/σ)²/2) + 4 e^(−((y₁+y₂)/2σ)²/2) + e^(−(y₂/σ)²/2)] · P_f/C · (x₂ − x₁)/Ṙ.
 * @param sigma a third of the distance from the flight line to the corridor's edge, m
 * @param rate Ṙ of table C-2, m/s
 * @throws RangeError where σ or Ṙ is not above 0
 * @see downrangeReferences.appendixC, tests/reference/downrange-casualty.csv
 */
export function impactSteps({ x1, x2, y1, y2 }: Rectangle, sigma: number, rate: number): ImpactSteps {
  if (!(sigma > 0) || !(rate > 0)) throw new RangeError(`impactSteps: σ ${sigma} m, Ṙ ${rate} m/s`);
  const edges = [y1 / sigma, (y1 + y2) / (2 * sigma), y2 / sigma] as const;
  const bells = edges.map((u) => Math.exp((-u * u) / 2)) as [number, number, number];
  const simpson = bells[0] + 4 * bells[1] + bells[2];
  const across = ((Math.abs(y2 - y1) / sigma) * simpson) / (6 * Math.sqrt(2 * Math.PI));
  const dwell = (x2 - x1) / rate;
  return {
    edges,
    bells,
    across,
    dwell,
    probability: (across * FAILURE_PROBABILITY * dwell) / FLIGHT_SECONDS,
  };
}

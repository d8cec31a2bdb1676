import { kilograms, metresPerSecond } from '../units.ts';
import type { MetresPerSecond } from '../units.ts';
import { rootBetween } from './brent.ts';
import type { Payload, Vehicle } from './types.ts';
import { burnsOf, idealDeltaV } from './vehicle.ts';

/** The payload is solved to a tenth of a gram, well inside the hundredth of a kilogram it is good for. */
const TOLERANCE = 1e-4;
/** Payloads at which the ideal Δv is tabulated, in shares of the lift-off mass: the brackets for the solver. */
const NODES = 64;
const SMALLEST_SHARE = 1e-4;

/**
 * A vehicle ready to be asked for payloads. The ideal Δv falls as the payload grows, so a table of it, made once,
 * brackets every answer tightly.
 */
export class PayloadSolver {
  readonly losses: MetresPerSecond;
  readonly reserve: MetresPerSecond;
  private readonly exhaust: Float64Array;
  private readonly starts: Float64Array;
  private readonly ends: Float64Array;
  private readonly payloads = new Float64Array(NODES + 1);
  private readonly deltaVs = new Float64Array(NODES + 1);
  private wanted = 0;

  /** @throws RangeError as burnsOf does */
  constructor(readonly vehicle: Vehicle) {
    const burns = burnsOf(vehicle);
    this.losses = metresPerSecond(vehicle.losses.gravity + vehicle.losses.drag + vehicle.losses.steering);
    this.reserve = vehicle.reserve;
    this.exhaust = Float64Array.from(burns, ({ exhaustSpeed }) => exhaustSpeed);
    this.starts = Float64Array.from(burns, ({ startMass }) => startMass);
    this.ends = Float64Array.from(burns, ({ endMass }) => endMass);
    const liftOff = this.starts[0] as number;
    const growth = SMALLEST_SHARE ** (-1 / (NODES - 1));
    this.deltaVs[0] = idealDeltaV(burns, kilograms(0));
    for (let k = 1; k <= NODES; k++) {
      const payload = liftOff * SMALLEST_SHARE * growth ** (k - 1);
      this.payloads[k] = payload;
      this.deltaVs[k] = idealDeltaV(burns, kilograms(payload));
    }
  }

  /** Ideal Δv with no payload, the most the vehicle gives. */
  get mostDeltaV(): MetresPerSecond {
    return metresPerSecond(this.deltaVs[0] as number);
  }

  /** Σ g₀ I_sp ln(m₀/m_f) less the Δv wanted, as idealDeltaV reckons it, over flat arrays. */
  private readonly excess = (payload: number): number => {
    let sum = 0;
    for (let k = 0; k < this.exhaust.length; k++) {
      const start = (this.starts[k] as number) + payload;
      sum += (this.exhaust[k] as number) * Math.log(start / ((this.ends[k] as number) + payload));
    }
    return sum - this.wanted;
  };

  /** First node whose ideal Δv is no more than the Δv wanted; NODES + 1 where every node gives more. */
  private firstBelow(deltaV: number): number {
    let low = 1;
    let high = NODES + 1;
    while (low < high) {
      const middle = (low + high) >> 1;
      if ((this.deltaVs[middle] as number) <= deltaV) high = middle;
      else low = middle + 1;
    }
    return low;
  }

  /**
   * The payload whose ideal Δv is the one given, in kg; 0 ≤ Δv ≤ mostDeltaV.
   * @returns −1 where even no payload falls short
   */
  massFor(deltaV: number): number {
    if (deltaV > (this.deltaVs[0] as number)) return -1;
    this.wanted = deltaV;
    const node = this.firstBelow(deltaV);
    if (node <= NODES) {
      const [low, high] = [this.payloads[node - 1] as number, this.payloads[node] as number];
      const above = (this.deltaVs[node - 1] as number) - deltaV;
      return rootBetween(this.excess, low, high, above, (this.deltaVs[node] as number) - deltaV, TOLERANCE);
    }
    return this.beyondTable(deltaV);
  }

  /** A Δv so small that more than the lift-off mass can be carried: the bracket doubles until it holds. */
  private beyondTable(deltaV: number): number {
    if (!(deltaV > 0)) throw new RangeError(`massFor: Δv ${deltaV} m/s is not above zero`);
    let low = this.payloads[NODES] as number;
    let high = low * 2;
    while (this.excess(high) > 0) {
      low = high;
      high *= 2;
    }
    return rootBetween(this.excess, low, high, this.excess(low), this.excess(high), TOLERANCE);
  }

  /** What is carried for a total Δv, or by how much the vehicle falls short with no payload. */
  carriedFor(deltaV: MetresPerSecond): Payload {
    const mass = this.massFor(deltaV);
    if (mass >= 0) return { kind: 'carries', mass: kilograms(mass) };
    return { kind: 'falls-short', shortfall: metresPerSecond(deltaV - this.mostDeltaV) };
  }
}

/**
 * The payload a vehicle carries for a total Δv, losses and reserve included, to 0.01 kg.
 * @see references.rocketEquation and references.brent, tests/reference/rocket.csv
 */
export function payloadFor(vehicle: Vehicle, deltaV: MetresPerSecond): Payload {
  return new PayloadSolver(vehicle).carriedFor(deltaV);
}

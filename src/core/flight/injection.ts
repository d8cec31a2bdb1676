import { metresPerSecond } from '../units.ts';
import type { MetresPerSecond, Radians } from '../units.ts';
import { exactCos } from './earth.ts';
import { circularSpeed, radiusOf, shapeOf, speedAt } from './orbit.ts';
import type { Shape } from './orbit.ts';
import { burnOf, costOf, sharedPlaneChange, simplePlaneChange } from './plane-change.ts';
import type { Burn } from './plane-change.ts';
import type { Profile, TargetOrbit } from './types.ts';

/** One profile of a target orbit: the speed at burn-out and what the burns after it cost. */
export interface Injection {
  readonly profile: Profile;
  /** v_i, inertial, at burn-out. */
  readonly speed: MetresPerSecond;
  /** The two transfer burns with no plane change; 0 for a direct profile. */
  readonly transfer: MetresPerSecond;
  /** The transfer burns, absent for a direct profile. */
  readonly burns?: { readonly first: Burn; readonly second: Burn };
  /** Speed at a node 90° from perigee, √(μ/p), where a direct profile changes its plane. */
  readonly nodeSpeed: MetresPerSecond;
}

/** What a target orbit asks, worked out once for every site. */
export interface Target {
  readonly orbit: TargetOrbit;
  readonly inclination: Radians;
  readonly cosInclination: number;
  readonly sinInclination: number;
  readonly injections: readonly Injection[];
}

function directInjection(shape: Shape): Injection {
  return {
    profile: 'direct',
    speed: speedAt(shape.perigeeRadius, shape.semiMajorAxis),
    transfer: metresPerSecond(0),
    nodeSpeed: circularSpeed(shape.semiLatusRectum),
  };
}

/** Burn 1 raises the apogee from the parking circle to r_a; burn 2 there sets the perigee. */
function parkingInjection(orbit: TargetOrbit, shape: Shape): Injection {
  const radius = radiusOf(orbit.parkingAltitude);
  const { apogeeRadius, semiMajorAxis } = shape;
  const transferAxis = (radius + apogeeRadius) / 2;
  const speed = circularSpeed(radius);
  const first = burnOf(speed, speedAt(radius, transferAxis));
  const second = burnOf(speedAt(apogeeRadius, transferAxis), speedAt(apogeeRadius, semiMajorAxis));
  return {
    profile: 'parking',
    speed,
    transfer: metresPerSecond(costOf(first, 0) + costOf(second, 0)),
    burns: { first, second },
    nodeSpeed: circularSpeed(shape.semiLatusRectum),
  };
}

/**
 * The profiles an orbit may be flown by: direct only with the perigee no higher than the parking altitude, parking
 * only with the parking altitude no higher than the apogee; at least one holds for `auto`.
 * @throws RangeError where the named profile is not allowed, or the perigee lies above the apogee
 */
export function targetOf(orbit: TargetOrbit): Target {
  const shape = shapeOf(orbit.perigeeAltitude, orbit.apogeeAltitude);
  const { profile, parkingAltitude } = orbit;
  const injections: Injection[] = [];
  if (profile !== 'parking' && orbit.perigeeAltitude <= parkingAltitude) {
    injections.push(directInjection(shape));
  }
  if (profile !== 'direct' && parkingAltitude <= orbit.apogeeAltitude) {
    injections.push(parkingInjection(orbit, shape));
  }
  if (injections.length === 0) {
    throw new RangeError(`targetOf: profile ${profile} with the parking altitude at ${parkingAltitude} m`);
  }
  return {
    orbit,
    inclination: orbit.inclination,
    cosInclination: exactCos(orbit.inclination),
    sinInclination: orbit.inclination === Math.PI ? 0 : Math.sin(orbit.inclination),
    injections,
  };
}

/**
 * The least that transfer and plane change can cost together, by one sine: each burn costs at least 2 √(v₁v₂) sin(x/2),
 * and sin(α/2) + sin((Δ − α)/2) ≥ sin(Δ/2).
 * @param sinHalf sin(Δ/2)
 */
export function planeChangeFloor({ burns, nodeSpeed, transfer }: Injection, sinHalf: number): number {
  if (burns === undefined) return 2 * nodeSpeed * sinHalf;
  const slower = Math.min(burns.first.product, burns.second.product);
  return Math.max(transfer, Math.sqrt(2 * slower) * sinHalf);
}

/** What a plane change adds to an injection's transfer burns. */
export function planeChangeCost(injection: Injection, change: number): MetresPerSecond {
  if (injection.burns === undefined) return simplePlaneChange(injection.nodeSpeed, change);
  const { first, second } = injection.burns;
  return metresPerSecond(Math.max(sharedPlaneChange(first, second, change) - injection.transfer, 0));
}

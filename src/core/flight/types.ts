import type { Kilograms, Metres, MetresPerSecond, Newtons, Radians, Seconds } from '../units.ts';

/** Permitted launch azimuths, clockwise from `from` to `to`, each 0…2π; 0 to 2π is all round. */
export interface Sector {
  readonly from: Radians;
  readonly to: Radians;
}

/** A launch site on the WGS 84 ellipsoid. */
export interface Site {
  /** Geodetic, −π/2…π/2, north positive. */
  readonly latitude: Radians;
  /** −π < λ ≤ π, east positive. */
  readonly longitude: Radians;
  /** Above the ellipsoid. */
  readonly height: Metres;
  /** None means all round. */
  readonly sectors: readonly Sector[];
}

export type Profile = 'direct' | 'parking';

/** A target orbit; altitudes count from the equatorial radius. */
export interface TargetOrbit {
  readonly perigeeAltitude: Metres;
  readonly apogeeAltitude: Metres;
  /** 0…π; above π/2 is retrograde. */
  readonly inclination: Radians;
  readonly profile: Profile | 'auto';
  readonly parkingAltitude: Metres;
  readonly flightsPerYear: number;
}

export interface FlightSettings {
  /** k: the share of the injection speed flown by the time of a turn, up to 7° of arc; 0…1. */
  readonly turnSpeedFraction: number;
}

export interface Stage {
  readonly dryMass: Kilograms;
  readonly propellantMass: Kilograms;
  readonly vacuumThrust: Newtons;
  readonly vacuumImpulse: Seconds;
  readonly seaLevelImpulse?: Seconds | undefined;
}

/** Parallel boosters; masses and thrust are for one. */
export interface Boosters extends Stage {
  readonly count: number;
}

export interface Losses {
  readonly gravity: MetresPerSecond;
  readonly drag: MetresPerSecond;
  readonly steering: MetresPerSecond;
}

export interface Vehicle {
  readonly fairingMass: Kilograms;
  /** Counted from 1: the fairing leaves at the end of this stage's burn. */
  readonly fairingLeavesAfterStage: number;
  readonly reserve: MetresPerSecond;
  readonly losses: Losses;
  readonly boosters?: Boosters | undefined;
  readonly stages: readonly Stage[];
}

export type WayKind = 'direct' | 'plane-change' | 'dogleg';
export type Branch = 'northerly' | 'southerly';

/** The Δv budget, line by line; `total` is the sum of the others. */
export interface Budget {
  readonly required: MetresPerSecond;
  readonly losses: MetresPerSecond;
  readonly dogleg: MetresPerSecond;
  readonly planeChange: MetresPerSecond;
  readonly transfer: MetresPerSecond;
  readonly reserve: MetresPerSecond;
  readonly total: MetresPerSecond;
}

/** What the vehicle carries; `unknown` where no vehicle was given. */
export type Payload =
  | { readonly kind: 'carries'; readonly mass: Kilograms }
  | { readonly kind: 'falls-short'; readonly shortfall: MetresPerSecond }
  | { readonly kind: 'unknown' };

/** One way to fly a target orbit from a site. Azimuths count clockwise from north, 0…2π. */
export interface FlownWay {
  readonly kind: WayKind;
  /** By the flown launch azimuth. */
  readonly branch: Branch;
  readonly profile: Profile;
  readonly injectionSpeed: MetresPerSecond;
  readonly inertialAzimuth: Radians;
  readonly launchAzimuth: Radians;
  readonly requiredSpeed: MetresPerSecond;
  /** Injection speed less required speed; negative where the turning Earth costs speed. */
  readonly rotationGain: MetresPerSecond;
  /** Turn of a dogleg, else 0. */
  readonly turn: Radians;
  /** Inclination changed after the first leg or in orbit, else 0. */
  readonly planeChange: Radians;
  readonly budget: Budget;
  readonly payload: Payload;
}

/** The way flown with the ways not taken, cheapest first. */
export interface Flown extends FlownWay {
  readonly inclination: Radians;
  readonly others: readonly FlownWay[];
}

/** No way needs a turn or plane change of 60° or less. */
export interface OutOfReach {
  readonly kind: 'out-of-reach';
  readonly inclination: Radians;
  /** The nearest inclination that the site's permitted azimuths give without a turn. */
  readonly nearestInclination: Radians;
}

export type Flight = Flown | OutOfReach;

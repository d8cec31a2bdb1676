import { wrap } from '../azimuths.ts';
import { flightOf } from '../evaluate.ts';
import type { Injection, Target } from '../injection.ts';
import { radiusOf } from '../orbit.ts';
import type { Pad } from '../pad.ts';
import { isPermitted } from '../sectors.ts';
import type { Edge } from '../sectors.ts';
import type { FlightSettings, Flown, FlownWay } from '../types.ts';
import { accountFor } from './account.ts';
import type { Account } from './account.ts';
import { AirTable } from './air-table.ts';
import { standardAir } from './atmosphere.ts';
import { searchWay } from './search-way.ts';
import { changesPlane } from './attempt.ts';
import type { Attempt } from './attempt.ts';
import type { Found } from './search-way.ts';
import { Course } from './course.ts';
import { Flyer } from './flyer.ts';
import { launchPointOf } from './launch-point.ts';
import { SIZE } from './operational.ts';
import { EARTH } from './planet.ts';
import { stackDeltaV, upperDeltaV } from './rocket.ts';
import type { Phase } from './stack.ts';
import { stackOf } from './vehicle-stack.ts';
import type { AscentVehicle } from './vehicle-stack.ts';

/** Why there is no flown ascent. */
export type NoAscent =
  /** No way within the turns that are counted reaches the orbit. */
  | 'out-of-reach'
  /** Thrust on the pad does not exceed the weight. */
  | 'does-not-lift-off'
  /** The stages above the first hold less than what is to be burnt after injection. */
  | 'too-much-after-injection'
  /** Even without payload the vehicle falls short. */
  | 'falls-short'
  /** The heading flown lies outside the permitted sectors, and none was found inside. */
  | 'no-permitted-heading'
  /** The search ended without meeting the end conditions. */
  | 'did-not-converge';

/** A flown ascent, or that there is none and why. */
export type Ascent =
  | {
      readonly kind: 'flown';
      /** kg to the target orbit. */
      readonly payload: number;
      readonly way: FlownWay;
      readonly account: Account;
      /** Variables of the steering: the start of a neighbouring search. */
      readonly variables: Float64Array;
      /** Starting points that had to be tried, over all ways, and flights from lift-off made for them. */
      readonly starts: number;
      readonly flights: number;
    }
  | {
      readonly kind: 'not-flown';
      readonly reason: NoAscent;
      readonly starts: number;
      readonly flights: number;
    };

export interface AscentSettings extends FlightSettings {
  /** Air-relative speed at which the site's sectors are checked, m/s. */
  readonly headingSpeed: number;
}

/** Ways looked at, and how much dearer than a turn that is flown one may be and still be looked at, m/s. */
const MOST_WAYS = 3;
const DEARER = 150;
const none = (reason: NoAscent, { starts, flights } = { starts: 0, flights: 0 }): Ascent => ({
  kind: 'not-flown',
  reason,
  starts,
  flights,
});

/** How far the plane flown may lie beside the one asked for, rad, where none is changed afterwards. */
const PLANE = 2e-7;
/** What an account may leave open, m/s. */
const OPEN = 0.1;

let air: AirTable | undefined;

/** Of two ascents the one that carries more; of two reasons the first. */
function better(best: Ascent | undefined, next: Ascent): Ascent {
  if (best === undefined) return next;
  if (next.kind === 'not-flown') return best;
  return best.kind === 'flown' && best.payload >= next.payload ? best : next;
}

/**
 * The way the closed form takes, by each profile that injects at another speed: to the closed form profiles cost about
 * the same, to a vehicle that pushes little the burn to perigee speed does not.
 */
function profilesOf(flight: Flown, target: Target): FlownWay[] {
  const other = target.injections.find(
    ({ profile, speed }) => profile !== flight.profile && Math.abs(speed - flight.injectionSpeed) > 1,
  );
  return other === undefined ? [flight] : [flight, { ...flight, profile: other.profile }];
}

/** Flies ascents of one vehicle: what they share is laid out once. */
export class AscentFlyer {
  private readonly course: Course;

  /** @throws RangeError as stackOf does */
  constructor(
    readonly vehicle: AscentVehicle,
    private readonly settings: AscentSettings,
  ) {
    const stack = stackOf(vehicle);
    air ??= new AirTable(standardAir);
    this.course = new Course(new Flyer(EARTH, air, stack.drag), stack);
  }

  private liftsOff(): boolean {
    const { stack, flyer } = this.course;
    const first = stack.phases[0] as Phase;
    flyer.air.look(0);
    const thrust = first.fixedThrust + first.mainThrust - flyer.air.pressure * first.exitArea;
    return thrust > (stack.liftOffMass + stack.fairingMass) * EARTH.standardGravity;
  }

  private attempt(pad: Pad, target: Target, way: FlownWay): Attempt {
    const injection = target.injections.find(({ profile }) => profile === way.profile) as Injection;
    const { perigeeAltitude, parkingAltitude } = target.orbit;
    return {
      course: this.course,
      launch: launchPointOf(pad.site),
      pad,
      target,
      injection,
      way,
      radius: radiusOf(way.profile === 'parking' ? parkingAltitude : perigeeAltitude),
      reserve: this.vehicle.reserve,
      headingSpeed: this.settings.headingSpeed,
    };
  }

  /**
   * The ascent from a pad to a target's injection with the payload at which what is left covers the rest.
   * @param warm variables of a neighbouring ascent, which are tried first
   */
  fly(pad: Pad, target: Target, warm?: Float64Array): Ascent {
    const flight = flightOf(pad, target, null, this.settings);
    if (flight.kind === 'out-of-reach') return none('out-of-reach');
    if (!this.liftsOff()) return none('does-not-lift-off');
    const dearest = flight.kind === 'direct' ? -Infinity : flight.budget.total + DEARER;
    const sure = profilesOf(flight, target);
    let best: Ascent | undefined;
    const made = { starts: 0, flights: 0 };
    for (const way of [...sure, ...flight.others].slice(0, MOST_WAYS)) {
      // One that is flown stands, unless another may be as good: the closed form tells turns only roughly.
      if (best?.kind === 'flown' && !sure.includes(way) && way.budget.total > dearest) break;
      const flown = this.flyWay(this.attempt(pad, target, way), warm);
      made.starts += flown.starts;
      made.flights += flown.flights;
      best = better(best, flown);
    }
    if (best === undefined) return none('out-of-reach');
    return { ...best, ...made };
  }

  private flyWay(attempt: Attempt, warm: Float64Array | undefined): Ascent {
    const { pad, way, injection, reserve } = attempt;
    const { stack } = this.course;
    if (injection.transfer + reserve >= upperDeltaV(stack)) return none('too-much-after-injection');
    // Short even with no loss at all: there is nothing to search for.
    const { required, planeChange } = way.budget;
    const least = required + planeChange + injection.transfer + reserve;
    if (stackDeltaV(stack, 0) < least) return none('falls-short');
    const pinned = way.kind === 'dogleg' || !isPermitted(pad.sectors, way.launchAzimuth);
    const found = searchWay(attempt, warm, pinned ? way.launchAzimuth : undefined);
    const flown = this.settle(attempt, found);
    if (flown.kind === 'not-flown' || pinned) return flown;
    if (isPermitted(pad.sectors, wrap(flown.account.heading))) return flown;
    return this.holdNearest(attempt, found, flown.account.heading);
  }

  /** A heading that drifted out of the sectors is held at their nearest edge; the yaw does the rest. */
  private holdNearest(attempt: Attempt, found: Found, heading: number): Ascent {
    const apart = ({ azimuth }: Edge) => Math.abs(Math.sin((azimuth - heading) / 2));
    const nearest = attempt.pad.sectors.edges.reduce((best, edge) =>
      apart(edge) < apart(best) ? edge : best,
    );
    const held = searchWay(attempt, found.variables, nearest.azimuth);
    const made = { starts: found.starts + held.starts, flights: found.flights + held.flights };
    const settled = this.settle(attempt, held);
    if (settled.kind === 'flown' || settled.reason === 'falls-short') return { ...settled, ...made };
    return none('no-permitted-heading', made);
  }

  /** What a search found as an ascent: flown again and accounted for, or why not. */
  private settle(attempt: Attempt, found: Found): Ascent {
    const { search, variables, starts, flights } = found;
    const payload = variables[SIZE] as number;
    if (search.outcome !== 'converged') return none('did-not-converge', found);
    if (payload < 0) return none('falls-short', found);
    const account = accountFor(attempt, variables);
    if (account === undefined || !(Math.abs(account.open) < OPEN)) return none('did-not-converge', found);
    const beside = Math.abs(account.inclination - attempt.target.inclination);
    if (!changesPlane(attempt) && !(beside < PLANE)) return none('did-not-converge', found);
    return { kind: 'flown', payload, way: attempt.way, account, variables, starts, flights };
  }
}

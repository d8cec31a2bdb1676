import { targetOf } from './injection.ts';
import type { Target } from './injection.ts';
import { nearestReached } from './nearest.ts';
import { padOf } from './pad.ts';
import type { Pad } from './pad.ts';
import { PayloadSolver } from './payload.ts';
import { massOf, readWay } from './read-way.ts';
import type { Flight, FlightSettings, OutOfReach, Site, TargetOrbit, Vehicle } from './types.ts';
import { chosenOf, othersOf, WayList } from './way-list.ts';
import { listWays } from './ways.ts';

export function outOfReach(pad: Pad, target: Target): OutOfReach {
  return {
    kind: 'out-of-reach',
    inclination: target.inclination,
    nearestInclination: nearestReached(pad, target),
  };
}

/** One pad and one target, prepared: the way flown and, in order of cost, the ways not taken. */
export function flightOf(
  pad: Pad,
  target: Target,
  solver: PayloadSolver | null,
  settings: FlightSettings,
  ways = new WayList(),
): Flight {
  listWays(pad, target, settings, ways, true);
  const chosen = chosenOf(ways);
  if (chosen < 0) return outOfReach(pad, target);
  const read = (index: number) => readWay(ways.at(index), massOf(ways.at(index), solver), solver);
  return {
    ...read(chosen),
    inclination: target.inclination,
    others: othersOf(ways, chosen).map(read),
  };
}

/**
 * How a site flies a target orbit: every way worked out, the one of least total Δv taken, with its budget and payload.
 * @param vehicle null where there is none: then no losses, no reserve and no payload
 * @throws RangeError for inputs that the contract refuses: a profile that is not allowed, a sector that is none,
 * boosters that outlast the core
 * @see tests/core/flight, tests/reference
 */
export function evaluateFlight(
  site: Site,
  orbit: TargetOrbit,
  vehicle: Vehicle | null,
  settings: FlightSettings,
): Flight {
  const solver = vehicle === null ? null : new PayloadSolver(vehicle);
  return flightOf(padOf(site), targetOf(orbit), solver, settings);
}

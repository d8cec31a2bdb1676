import type { Target } from './injection.ts';
import { targetOf } from './injection.ts';
import { padOf } from './pad.ts';
import type { Pad } from './pad.ts';
import { PayloadSolver } from './payload.ts';
import { outOfReach } from './evaluate.ts';
import { massOf, readWay } from './read-way.ts';
import type { Flight, FlightSettings, Site, TargetOrbit, Vehicle } from './types.ts';
import { chosenOf, WayList, WayRecord } from './way-list.ts';
import { listWays } from './ways.ts';

/** Figures of one result, in the order they lie in the table. */
const STRIDE = 15;
const OUT_OF_REACH = -1;

/**
 * Results of many sites and orbits in one flat array, site by site, the way flown alone. A result becomes an object
 * only when it is asked for: most of the time of a batch would else go into making and collecting objects.
 */
export class FlightTable {
  private readonly figures: Float64Array;
  private readonly record = new WayRecord();

  constructor(
    readonly pads: readonly Pad[],
    readonly targets: readonly Target[],
    readonly solver: PayloadSolver | null,
  ) {
    this.figures = new Float64Array(pads.length * targets.length * STRIDE);
  }

  private at(site: number, orbit: number): number {
    return (site * this.targets.length + orbit) * STRIDE;
  }

  setOutOfReach(site: number, orbit: number): void {
    this.figures[this.at(site, orbit)] = OUT_OF_REACH;
  }

  set(site: number, orbit: number, way: WayRecord, mass: number): void {
    const { figures } = this;
    const at = this.at(site, orbit);
    figures[at] = way.kind;
    figures[at + 1] = way.branch;
    figures[at + 2] = way.profile;
    figures[at + 3] = way.edge;
    figures[at + 4] = way.injectionSpeed;
    figures[at + 5] = way.inertialAzimuth;
    figures[at + 6] = way.launchAzimuth;
    figures[at + 7] = way.requiredSpeed;
    figures[at + 8] = way.turn;
    figures[at + 9] = way.planeChange;
    figures[at + 10] = way.doglegCost;
    figures[at + 11] = way.planeChangeCost;
    figures[at + 12] = way.transfer;
    figures[at + 13] = way.total;
    figures[at + 14] = mass;
  }

  private load(at: number): WayRecord {
    const { figures, record: way } = this;
    way.kind = figures[at] as number;
    way.branch = figures[at + 1] as number;
    way.profile = figures[at + 2] as number;
    way.edge = figures[at + 3] as number;
    way.injectionSpeed = figures[at + 4] as number;
    way.inertialAzimuth = figures[at + 5] as number;
    way.launchAzimuth = figures[at + 6] as number;
    way.requiredSpeed = figures[at + 7] as number;
    way.turn = figures[at + 8] as number;
    way.planeChange = figures[at + 9] as number;
    way.doglegCost = figures[at + 10] as number;
    way.planeChangeCost = figures[at + 11] as number;
    way.transfer = figures[at + 12] as number;
    way.total = figures[at + 13] as number;
    return way;
  }

  /** Payload of a result in kg; 0 where it falls short, is out of reach or there is no vehicle. */
  payloadMass(site: number, orbit: number): number {
    const at = this.at(site, orbit);
    return this.figures[at] === OUT_OF_REACH ? 0 : Math.max(this.figures[at + 14] as number, 0);
  }

  /** A result as an object, without the ways not taken. */
  flight(site: number, orbit: number): Flight {
    const at = this.at(site, orbit);
    const target = this.targets[orbit] as Target;
    if (this.figures[at] === OUT_OF_REACH) return outOfReach(this.pads[site] as Pad, target);
    const way = readWay(this.load(at), this.figures[at + 14] as number, this.solver);
    return { ...way, inclination: target.inclination, others: [] };
  }
}

/** Every pad against every target, prepared. */
export function tableOf(
  pads: readonly Pad[],
  targets: readonly Target[],
  solver: PayloadSolver | null,
  settings: FlightSettings,
): FlightTable {
  const table = new FlightTable(pads, targets, solver);
  const ways = new WayList();
  for (let site = 0; site < pads.length; site++) {
    for (let orbit = 0; orbit < targets.length; orbit++) {
      listWays(pads[site] as Pad, targets[orbit] as Target, settings, ways, false);
      const chosen = chosenOf(ways);
      if (chosen < 0) table.setOutOfReach(site, orbit);
      else table.set(site, orbit, ways.at(chosen), massOf(ways.at(chosen), solver));
    }
  }
  return table;
}

/**
 * The batch form of evaluateFlight: the same formulas, the way flown alone.
 * @throws RangeError as evaluateFlight does
 */
export function evaluateFlights(
  sites: readonly Site[],
  orbits: readonly TargetOrbit[],
  vehicle: Vehicle | null,
  settings: FlightSettings,
): FlightTable {
  const solver = vehicle === null ? null : new PayloadSolver(vehicle);
  return tableOf(sites.map(padOf), orbits.map(targetOf), solver, settings);
}

import { kilograms, metresPerSecond, radians } from '../units.ts';
import type { PayloadSolver } from './payload.ts';
import type { Budget, FlownWay, Payload } from './types.ts';
import { BRANCHES, PROFILES, WAY_KINDS } from './way-list.ts';
import type { WayRecord } from './way-list.ts';

/** Payload figures of a record: a mass, or one of these. */
export const FALLS_SHORT = -1;
export const NO_VEHICLE = -2;

/** Δv a way asks of the vehicle: its own lines, the losses and the reserve. */
export function totalOf(way: WayRecord, solver: PayloadSolver | null): number {
  const own = way.requiredSpeed + way.doglegCost + way.planeChangeCost + way.transfer;
  return solver === null ? own : own + solver.losses + solver.reserve;
}

/** What the vehicle carries by a way, in kg, or FALLS_SHORT or NO_VEHICLE. */
export function massOf(way: WayRecord, solver: PayloadSolver | null): number {
  return solver === null ? NO_VEHICLE : solver.massFor(totalOf(way, solver));
}

function budgetOf(way: WayRecord, solver: PayloadSolver | null): Budget {
  return {
    required: metresPerSecond(way.requiredSpeed),
    losses: metresPerSecond(solver?.losses ?? 0),
    dogleg: metresPerSecond(way.doglegCost),
    planeChange: metresPerSecond(way.planeChangeCost),
    transfer: metresPerSecond(way.transfer),
    reserve: metresPerSecond(solver?.reserve ?? 0),
    total: metresPerSecond(totalOf(way, solver)),
  };
}

function payloadOf(mass: number, total: number, solver: PayloadSolver | null): Payload {
  if (solver === null) return { kind: 'unknown' };
  if (mass >= 0) return { kind: 'carries', mass: kilograms(mass) };
  return { kind: 'falls-short', shortfall: metresPerSecond(total - solver.mostDeltaV) };
}

/** A record as core hands it out, with its budget and the payload for `mass` from massOf. */
export function readWay(way: WayRecord, mass: number, solver: PayloadSolver | null): FlownWay {
  const budget = budgetOf(way, solver);
  return {
    kind: WAY_KINDS[way.kind] as FlownWay['kind'],
    branch: BRANCHES[way.branch] as FlownWay['branch'],
    profile: PROFILES[way.profile] as FlownWay['profile'],
    injectionSpeed: metresPerSecond(way.injectionSpeed),
    inertialAzimuth: radians(way.inertialAzimuth),
    launchAzimuth: radians(way.launchAzimuth),
    requiredSpeed: metresPerSecond(way.requiredSpeed),
    rotationGain: metresPerSecond(way.injectionSpeed - way.requiredSpeed),
    turn: radians(way.turn),
    planeChange: radians(way.planeChange),
    budget,
    payload: payloadOf(mass, budget.total, solver),
  };
}

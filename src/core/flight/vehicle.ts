import { constants } from '../constants.ts';
import { kilograms, metresPerSecond } from '../units.ts';
import type { Kilograms, MetresPerSecond } from '../units.ts';
import type { Boosters, Stage, Vehicle } from './types.ts';

const G0 = constants.standardGravity.value;

/** Shares of the step from sea level to vacuum that a first stage counts: alone, and beside burning boosters. */
const FIRST_STAGE_STEP = 0.8;
const PARALLEL_STEP = 0.75;

/** One burn: exhaust speed g₀ I_sp, and the masses aboard at its start and end, payload apart. */
export interface VehicleBurn {
  readonly exhaustSpeed: MetresPerSecond;
  readonly startMass: Kilograms;
  readonly endMass: Kilograms;
}

function blendedImpulse({ vacuumImpulse, seaLevelImpulse }: Stage, step: number): number {
  if (seaLevelImpulse === undefined) return vacuumImpulse;
  return seaLevelImpulse + step * (vacuumImpulse - seaLevelImpulse);
}

/** Mass flow in kg/s: vacuum thrust / (g₀ × vacuum I_sp). */
export const massFlow = ({ vacuumThrust, vacuumImpulse }: Stage): number =>
  vacuumThrust / (G0 * vacuumImpulse);

/** Something that burns for a while: its impulse, what it burns and what is dropped afterwards. */
interface Phase {
  readonly impulse: number;
  readonly burnt: number;
  readonly dropped: number;
}

/** The boosters with the core beside them, then the core with what it has left. */
function parallelPhases(boosters: Boosters, core: Stage, drop: number): Phase[] {
  const time = boosters.propellantMass / massFlow(boosters);
  const coreBurnt = time * massFlow(core);
  if (coreBurnt > core.propellantMass * (1 + 1e-12)) {
    throw new RangeError(`burnsOf: boosters burn ${time} s, longer than the core`);
  }
  const boosterFlow = boosters.count * massFlow(boosters);
  const flow = boosterFlow + massFlow(core);
  const weighted =
    boosterFlow * blendedImpulse(boosters, PARALLEL_STEP) +
    massFlow(core) * blendedImpulse(core, PARALLEL_STEP);
  return [
    {
      impulse: weighted / flow,
      burnt: boosters.count * boosters.propellantMass + coreBurnt,
      dropped: boosters.count * boosters.dryMass,
    },
    { impulse: core.vacuumImpulse, burnt: Math.max(core.propellantMass - coreBurnt, 0), dropped: drop },
  ];
}

function phasesOf({ boosters, stages, fairingMass, fairingLeavesAfterStage }: Vehicle): Phase[] {
  return stages.flatMap((stage, index) => {
    const dropped = stage.dryMass + (index + 1 === fairingLeavesAfterStage ? fairingMass : 0);
    if (index === 0 && boosters !== undefined && boosters.count > 0) {
      return parallelPhases(boosters, stage, dropped);
    }
    const impulse = index === 0 ? blendedImpulse(stage, FIRST_STAGE_STEP) : stage.vacuumImpulse;
    return [{ impulse, burnt: stage.propellantMass, dropped }];
  });
}

/**
 * The burns of a vehicle in order, with entered losses: back-pressure is in the first burn's specific impulse.
 * A stage's dry mass leaves after its burn, the fairing at the end of the named stage's.
 * @throws RangeError where the boosters outlast the core or the fairing leaves after a stage that is not there
 * @see references.rocketEquation, tests/reference/rocket.csv
 */
export function burnsOf(vehicle: Vehicle): VehicleBurn[] {
  if (vehicle.fairingLeavesAfterStage < 1 || vehicle.fairingLeavesAfterStage > vehicle.stages.length) {
    throw new RangeError(
      `burnsOf: no stage ${vehicle.fairingLeavesAfterStage} for the fairing to leave after`,
    );
  }
  const phases = phasesOf(vehicle);
  let aboard = phases.reduce((sum, { burnt, dropped }) => sum + burnt + dropped, 0);
  return phases.map(({ impulse, burnt, dropped }) => {
    const startMass = aboard;
    aboard -= burnt + dropped;
    return {
      exhaustSpeed: metresPerSecond(G0 * impulse),
      startMass: kilograms(startMass),
      endMass: kilograms(startMass - burnt),
    };
  });
}

/** Ideal Δv with a payload aboard, Σ g₀ I_sp ln(m₀/m_f). @see references.rocketEquation, tests/reference/rocket.csv */
export function idealDeltaV(burns: readonly VehicleBurn[], payload: Kilograms): MetresPerSecond {
  let sum = 0;
  for (const { exhaustSpeed, startMass, endMass } of burns) {
    sum += exhaustSpeed * Math.log((startMass + payload) / (endMass + payload));
  }
  return metresPerSecond(sum);
}

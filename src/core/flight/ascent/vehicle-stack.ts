import type { Boosters, Stage, Vehicle } from '../types.ts';
import { burnsOf, massFlow } from '../vehicle.ts';
import type { DragTable, Phase, Stack } from './stack.ts';

const SEA_LEVEL_PRESSURE = 101_325;
/** A vehicle of one stage leaves the gravity turn when this share of its propellant is gone: it is above the air. */
const ONE_STAGE_TURN = 0.6;

/** A core that burns on for this long after its boosters part, in seconds, is steered as upper stages are. */
const SUSTAINS = 120;

/** What a flown ascent needs of a vehicle beside what the closed form does. */
export interface AscentFigures {
  /** m² of the core and what it carries, and of one booster. */
  readonly area: number;
  readonly boosterArea: number;
  readonly drag: DragTable;
  /** Seconds. */
  readonly verticalRise: number;
  readonly kick: number;
  /** Pa and m/s²; Infinity where there is no limit. */
  readonly dynamicPressureLimit: number;
  readonly accelerationLimit: number;
  /** ½ρv³ in W/m² below which the fairing leaves; 0 where it leaves with its stage. */
  readonly fairingHeating: number;
}

/** A vehicle that can be flown. */
export interface AscentVehicle extends Vehicle {
  readonly ascent: AscentFigures;
}

/** Exit area from the two specific impulses; none without a sea-level one. */
function exitArea({ vacuumThrust, vacuumImpulse, seaLevelImpulse }: Stage): number {
  if (seaLevelImpulse === undefined) return 0;
  return (vacuumThrust * (1 - seaLevelImpulse / vacuumImpulse)) / SEA_LEVEL_PRESSURE;
}

/** Boosters and core together, until the boosters are empty. */
function parallelPhase(boosters: Boosters, core: Stage, figures: AscentFigures, liftOffMass: number): Phase {
  const { count } = boosters;
  const duration = boosters.propellantMass / massFlow(boosters);
  return {
    fixedThrust: count * boosters.vacuumThrust,
    fixedFlow: count * massFlow(boosters),
    mainThrust: core.vacuumThrust,
    mainFlow: massFlow(core),
    exitArea: count * exitArea(boosters) + exitArea(core),
    area: figures.area + count * figures.boosterArea,
    accelerationLimit: figures.accelerationLimit,
    duration,
    endMass: liftOffMass - count * boosters.propellantMass - duration * massFlow(core),
    dropped: count * boosters.dryMass,
    dropsFairing: false,
    stage: 0,
  };
}

/** A stage alone; `mass` at its end, payload and fairing apart. */
function stagePhase(stage: Stage, figures: AscentFigures, endMass: number, index: number): Phase {
  return {
    fixedThrust: 0,
    fixedFlow: 0,
    mainThrust: stage.vacuumThrust,
    mainFlow: massFlow(stage),
    exitArea: exitArea(stage),
    area: figures.area,
    accelerationLimit: figures.accelerationLimit,
    endMass,
    dropped: stage.dryMass,
    dropsFairing: false,
    stage: index,
  };
}

/** Whether the core burns on so long after its boosters part that it does most of its work above the air. */
function sustains(core: Stage, boosters: Boosters | undefined): boolean {
  if (boosters === undefined || boosters.count === 0) return false;
  const together = boosters.propellantMass / massFlow(boosters);
  return core.propellantMass / massFlow(core) - together > SUSTAINS;
}

/** One stage flown in two: the gravity turn, and above the air what upper stages do. */
function splitStage(stage: Stage, figures: AscentFigures, endMass: number): Phase[] {
  const whole = stagePhase(stage, figures, endMass, 0);
  const turned = endMass + (1 - ONE_STAGE_TURN) * stage.propellantMass;
  return [
    { ...whole, endMass: turned, dropped: 0 },
    { ...whole, stage: 1 },
  ];
}

/**
 * A vehicle's phases in order, for flight: vacuum specific impulse throughout, back-pressure on the exit area.
 * @throws RangeError as burnsOf does: boosters that outlast the core, a fairing that leaves after no stage
 */
export function stackOf(vehicle: AscentVehicle): Stack {
  burnsOf(vehicle);
  const { stages, boosters, ascent } = vehicle;
  const core = stages[0] as Stage;
  const count = boosters?.count ?? 0;
  let above = stages.reduce((sum, { dryMass, propellantMass }) => sum + dryMass + propellantMass, 0);
  const liftOffMass =
    above + (boosters === undefined ? 0 : count * (boosters.dryMass + boosters.propellantMass));
  const phases =
    boosters === undefined || count === 0 ? [] : [parallelPhase(boosters, core, ascent, liftOffMass)];
  stages.forEach((stage, index) => {
    const endMass = above - stage.propellantMass;
    const sustaining = index === 0 && sustains(core, boosters);
    const split = stages.length === 1 && !sustaining;
    const flown = split
      ? splitStage(stage, ascent, endMass)
      : [stagePhase(stage, ascent, endMass, sustaining ? 1 : index)];
    const leaves = ascent.fairingHeating === 0 && index + 1 === vehicle.fairingLeavesAfterStage;
    phases.push(...flown.map((phase, k) => ({ ...phase, dropsFairing: leaves && k === flown.length - 1 })));
    above = endMass - stage.dryMass;
  });
  return {
    phases,
    liftOffMass,
    fairingMass: vehicle.fairingMass,
    drag: ascent.drag,
    verticalRise: ascent.verticalRise,
    kick: ascent.kick,
    dynamicPressureLimit: ascent.dynamicPressureLimit,
    fairingHeating: ascent.fairingHeating,
  };
}

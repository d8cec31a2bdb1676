import { AirTable } from '#core/flight/ascent/air-table.ts';
import { exponentialAir } from '#core/flight/ascent/atmosphere.ts';
import { Course } from '#core/flight/ascent/course.ts';
import type { Steps } from '#core/flight/ascent/pace.ts';
import { Flyer } from '#core/flight/ascent/flyer.ts';
import { NODES } from '#core/flight/ascent/modes.ts';
import type { Planet } from '#core/flight/ascent/planet.ts';
import type { Phase, Stack } from '#core/flight/ascent/stack.ts';

const DEGREE = Math.PI / 180;

/** A phase that burns nothing, drops nothing and knows no limit, to be filled in. */
export const emptyPhase: Phase = {
  fixedThrust: 0,
  fixedFlow: 0,
  mainThrust: 0,
  mainFlow: 0,
  exitArea: 0,
  area: 0,
  accelerationLimit: Infinity,
  endMass: 0,
  dropped: 0,
  dropsFairing: false,
  stage: 0,
};

/** A stack without fairing, limits or turns, to be filled in. */
export const plainStack = (phases: readonly Phase[], liftOffMass: number, drag: number): Stack => ({
  phases,
  liftOffMass,
  fairingMass: 0,
  drag: [[0, drag]],
  verticalRise: 0,
  kick: 0,
  dynamicPressureLimit: Infinity,
  fairingHeating: 0,
});

/*
 * The four-phase ascent of Betts, Practical Methods for Optimal Control (2010), example 6.15 [read in the examples of
 * two general libraries]: round Earth, exponential air, nine boosters in two sets, two stages.
 */
export const benchmarkPlanet: Planet = {
  gravitationalParameter: 3.986012e14,
  equatorialRadius: 6_378_145,
  eccentricitySquared: 0,
  secondZonalHarmonic: 0,
  rotationRate: 7.29211585e-5,
  standardGravity: 9.80665,
};
export const benchmarkPayload = 4164;

const LIFT_OFF = 301_454;
const AREA = 4 * Math.PI;
const BOOSTER = { thrust: 628_500, flow: 17_010 / 75.2, dry: 19_290 - 17_010 };
const CORE = { thrust: 1_083_100, flow: 95_550 / 261, dry: 104_380 - 95_550 };
const SECOND = { thrust: 110_094, flow: 16_820 / 700 };

function parallel(count: number): Phase {
  return {
    ...emptyPhase,
    area: AREA,
    fixedThrust: count * BOOSTER.thrust,
    fixedFlow: count * BOOSTER.flow,
    mainThrust: CORE.thrust,
    mainFlow: CORE.flow,
    duration: 75.2,
    dropped: count * BOOSTER.dry,
  };
}

const core: Phase = {
  ...emptyPhase,
  area: AREA,
  mainThrust: CORE.thrust,
  mainFlow: CORE.flow,
  dropped: CORE.dry,
};
const second: Phase = {
  ...emptyPhase,
  area: AREA,
  mainThrust: SECOND.thrust,
  mainFlow: SECOND.flow,
  stage: 1,
};

/** Its stack; `finalTime` ends the last burn by the clock, else at an end mass. */
export function benchmarkStack(finalTime?: number): Stack {
  const last = finalTime === undefined ? {} : { duration: finalTime - 261 };
  let mass = LIFT_OFF - benchmarkPayload;
  const phases = [parallel(6), parallel(3), { ...core, duration: 261 - 150.4 }].map((phase) => {
    const endMass = mass - phase.duration! * (phase.fixedFlow + phase.mainFlow);
    mass = endMass - phase.dropped;
    return { ...phase, endMass };
  });
  // Without its 16,820 kg the second stage alone: 19,300 kg less the propellant.
  return plainStack(
    [...phases, { ...second, endMass: 19_300 - 16_820, ...last }],
    LIFT_OFF - benchmarkPayload,
    0.5,
  );
}

export const benchmarkAir = new AirTable(exponentialAir(1.225, 7200));

/** 28.5° north on the round Earth. */
export const benchmarkLaunch = {
  place: Float64Array.of(
    benchmarkPlanet.equatorialRadius * Math.cos(28.5 * DEGREE),
    0,
    benchmarkPlanet.equatorialRadius * Math.sin(28.5 * DEGREE),
  ),
  up: Float64Array.of(Math.cos(28.5 * DEGREE), 0, Math.sin(28.5 * DEGREE)),
  east: Float64Array.of(0, 1, 0),
  north: Float64Array.of(-Math.sin(28.5 * DEGREE), 0, Math.cos(28.5 * DEGREE)),
};

/** Its published steering: time in s, pitch over the horizontal of the launch site and yaw to the north in degrees. */
export const benchmarkNodes: readonly (readonly [number, number, number])[] = [
  [0, 71.0442, -0.0425],
  [4, 70.0588, -0.043],
  [8, 68.9405, -0.0437],
  [12, 67.6798, -0.0447],
  [16, 66.2637, -0.0461],
  [20, 64.7095, -0.0478],
  [26, 62.0764, -0.051],
  [32, 59.1285, -0.0549],
  [40, 54.7951, -0.0609],
  [50, 49.0545, -0.0689],
  [60, 43.3336, -0.0768],
  [75.2, 35.9783, -0.0861],
  [90, 30.9729, -0.0919],
  [105, 27.5511, -0.0954],
  [120, 25.1686, -0.0974],
  [135, 23.4036, -0.0987],
  [150.4, 21.9282, -0.0996],
  [175, 19.8749, -0.1006],
  [200, 17.8739, -0.1013],
  [230, 15.4646, -0.1019],
  [261, 12.9589, -0.1024],
  [327.3139, 7.5093, -0.1028],
  [393.6279, 1.9048, -0.1021],
  [459.9418, -3.8601, -0.1002],
  [526.2557, -9.7981, -0.0972],
  [592.5697, -15.908, -0.0929],
  [658.8836, -22.1776, -0.0873],
  [725.1975, -28.581, -0.0806],
  [791.5114, -35.0777, -0.0727],
  [857.8254, -41.6156, -0.0638],
  [924.1393, -48.1272, -0.0541],
];

/** The benchmark on its pad, to be steered by the nodes. */
export function benchmarkCourse(steps: Steps): Course {
  const flyer = new Flyer(benchmarkPlanet, benchmarkAir, [[0, 0.5]]);
  const course = new Course(flyer, benchmarkStack(924.1393));
  course.steps = steps;
  flyer.accounting = true;
  course.start(benchmarkLaunch.place, benchmarkPayload);
  flyer.steering.up.set(benchmarkLaunch.up);
  flyer.steering.along.set(benchmarkLaunch.east);
  flyer.steering.nodeTimes = Float64Array.from(benchmarkNodes, ([time]) => time);
  flyer.steering.nodePitch = Float64Array.from(benchmarkNodes, ([, pitch]) => pitch * DEGREE);
  flyer.steering.nodeYaw = Float64Array.from(benchmarkNodes, ([, , yaw]) => yaw * DEGREE);
  flyer.steering.mode = NODES;
  return course;
}

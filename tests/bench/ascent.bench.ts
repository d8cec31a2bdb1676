import { AscentVehicle } from '#contract/ascent.ts';
import { toAscentVehicle } from '#contract/to-ascent.ts';
import { toOrbit, toSite } from '#contract/to-core.ts';
import { AirTable } from '#core/flight/ascent/air-table.ts';
import { standardAir } from '#core/flight/ascent/atmosphere.ts';
import { Course } from '#core/flight/ascent/course.ts';
import { AscentFlyer } from '#core/flight/ascent/fly-ascent.ts';
import type { Ascent } from '#core/flight/ascent/fly-ascent.ts';
import { Flyer, MASS } from '#core/flight/ascent/flyer.ts';
import { injectionGoal } from '#core/flight/ascent/goal.ts';
import { launchPointOf } from '#core/flight/ascent/launch-point.ts';
import {
  AZIMUTH,
  FIRST_TANGENT,
  LAST_TANGENT,
  Operational,
  payloadSizing,
  SIZE,
  TILT,
  YAW,
} from '#core/flight/ascent/operational.ts';
import { EARTH } from '#core/flight/ascent/planet.ts';
import { stackOf } from '#core/flight/ascent/vehicle-stack.ts';
import { padOf, targetOf } from '#core/flight/index.ts';
import { fromDegrees, metres } from '#core/units.ts';
import { scenario } from '#seed/demo/scenario.ts';
import library from '#seed/vehicles.json' with { type: 'json' };
import { plainAscent } from '#tests/support/plain-ascent.ts';

const SETTINGS = { turnSpeedFraction: 0.6, headingSpeed: 500 };
const LATITUDE = fromDegrees(8);
const ROUNDS = 15;
const FLIGHTS = 200;

const vehicles = library.vehicles.map((vehicle) => toAscentVehicle(AscentVehicle.parse(vehicle)));
const rowan = vehicles[1]!;
const stack = stackOf(rowan);
const steering = { tilt: 0.12, azimuth: 0.7, firstTangent: 0.45, lastTangent: -0.05, yaw: 0.1 };
const PAYLOAD = 9500;

/** One flight from lift-off to injection, to be made again and again. */
function flight(): Operational {
  const course = new Course(new Flyer(EARTH, new AirTable(standardAir), stack.drag), stack);
  const launch = launchPointOf({ latitude: LATITUDE, height: metres(0) });
  const goal = injectionGoal(6_563_137, 7793);
  const problem = new Operational(
    course,
    launch,
    goal,
    payloadSizing(stack, () => 100),
    [],
    undefined,
    1,
  );
  problem.all[TILT] = steering.tilt;
  problem.all[AZIMUTH] = steering.azimuth;
  problem.all[SIZE] = PAYLOAD;
  problem.all[FIRST_TANGENT] = steering.firstTangent;
  problem.all[LAST_TANGENT] = steering.lastTangent;
  problem.all[YAW] = steering.yaw;
  return problem;
}

/** Microseconds a flight, in the best of some rounds: what else the machine does counts least there. */
function microseconds(fly: () => unknown): number {
  const rounds = Array.from({ length: ROUNDS }, () => {
    const from = performance.now();
    for (let k = 0; k < FLIGHTS; k++) fly();
    return ((performance.now() - from) * 1000) / FLIGHTS;
  });
  return Math.min(...rounds);
}

const median = (values: readonly number[]): number => [...values].sort((a, b) => a - b)[values.length >> 1]!;

/** An integration beside the same one with plain objects and arrays, its air worked out from the formulas. */
export async function benchIntegration(): Promise<string[]> {
  const problem = flight();
  const core = microseconds(() => problem.flyFirst() && problem.flyUpper());
  const steps = problem.course.count / problem.course.flights;
  const { tangentDuration, course } = problem;
  const endMass = course.flyer.state[MASS]!;
  const plain = microseconds(() =>
    plainAscent(stack, { ...steering, latitude: LATITUDE, payload: PAYLOAD, tangentDuration, endMass }),
  );
  return Promise.resolve([
    `ascent: ${core.toFixed(0)} µs an integration of ${steps.toFixed(0)} steps (goal 40–78), ${(1e6 / core).toFixed(0)}/s; plain objects ${plain.toFixed(0)} µs, ratio ${(plain / core).toFixed(1)}`,
  ]);
}

interface Solve {
  readonly ms: number;
  readonly ascent: Ascent;
}

/** Solves of one vehicle from 12 latitudes to 5 orbits all round, cold or from the neighbour's; best of some rounds. */
function solves(warm: boolean): Solve[] {
  const orbits = scenario.studies[0].orbits.map((orbit) =>
    targetOf(toOrbit({ profile: 'auto', parkingKm: 185, flightsPerYear: 0, ...orbit })),
  );
  const pads = Array.from({ length: 12 }, (_, k) =>
    padOf(toSite({ latitudeDeg: 0.5 + 1.2 * k, longitudeDeg: 0, elevationM: 0, permittedAzimuthsDeg: [] })),
  );
  const flyer = new AscentFlyer(rowan, SETTINGS);
  const once = (): Solve[] =>
    orbits.flatMap((target) => {
      let start: Float64Array | undefined;
      return pads.map((pad) => {
        const from = performance.now();
        const ascent = flyer.fly(pad, target, warm ? start : undefined);
        const ms = performance.now() - from;
        start = ascent.kind === 'flown' ? ascent.variables : undefined;
        return { ms, ascent };
      });
    });
  const rounds = Array.from({ length: 5 }, once);
  return rounds[0]!.map((solve, k) => ({ ...solve, ms: Math.min(...rounds.map((round) => round[k]!.ms)) }));
}

export async function benchSolve(): Promise<string[]> {
  const [cold, warm] = [solves(false), solves(true)];
  const flights = (list: Solve[]) => median(list.map(({ ascent }) => ascent.flights));
  const several = cold.filter(({ ascent }) => ascent.starts > 1).length;
  return Promise.resolve([
    `ascent: solved in ${median(cold.map(({ ms }) => ms)).toFixed(2)} ms (median of ${cold.length}, goal 5), ${flights(cold)} integrations; from a warm start ${median(warm.map(({ ms }) => ms)).toFixed(2)} ms (goal 2), ${flights(warm)}; ${several} needed several starts`,
  ]);
}

/** The demo's 12 sites with their sectors × 5 orbits × 2 vehicles, once, as a study flies them. */
export async function benchStudy(): Promise<string[]> {
  const { sites, orbits } = scenario.studies[0];
  const pads = sites.map((site) => padOf(toSite({ elevationM: 0, permittedAzimuthsDeg: [], ...site })));
  const targets = orbits.map((orbit) =>
    targetOf(toOrbit({ profile: 'auto', parkingKm: 185, flightsPerYear: 0, ...orbit })),
  );
  const from = performance.now();
  const ascents = vehicles.flatMap((vehicle) => {
    const flyer = new AscentFlyer(vehicle, SETTINGS);
    return pads.flatMap((pad) => targets.map((target) => flyer.fly(pad, target)));
  });
  const seconds = (performance.now() - from) / 1000;
  const tally = new Map<string, number>();
  for (const ascent of ascents) {
    const key = ascent.kind === 'flown' ? 'flown' : ascent.reason;
    tally.set(key, (tally.get(key) ?? 0) + 1);
  }
  const outcomes = [...tally].map(([key, count]) => `${count} ${key}`).join(', ');
  return Promise.resolve([
    `ascent: ${ascents.length} of the demo in ${seconds.toFixed(2)} s (goal 2): ${outcomes}`,
  ]);
}

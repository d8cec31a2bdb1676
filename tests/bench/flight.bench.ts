import { evaluateFlights, flightOf, padOf, PayloadSolver, targetOf } from '#core/flight/index.ts';
import type { FlightSettings, Sector, Site, TargetOrbit, Vehicle } from '#core/flight/index.ts';
import {
  fromDegrees,
  fromKilometres,
  kilograms,
  metres,
  metresPerSecond,
  newtons,
  seconds,
} from '#core/units.ts';

const SITES = 2000;
const ROUNDS = 25;

/** Numerical Recipes' 32-bit linear congruential step: figures that are the same each time, no more. */
function* uniforms(seed: number): Generator<number, never> {
  for (let state = seed; ;) {
    state = (state * 1_664_525 + 1_013_904_223) >>> 0;
    yield state / 2 ** 32;
  }
}

const orbit = (perigeeKm: number, apogeeKm: number, inclinationDeg: number): TargetOrbit => ({
  perigeeAltitude: fromKilometres(perigeeKm),
  apogeeAltitude: fromKilometres(apogeeKm),
  inclination: fromDegrees(inclinationDeg),
  profile: 'auto',
  parkingAltitude: fromKilometres(185),
  flightsPerYear: 4,
});

/** Low inclination, station, sun-synchronous, transfer to geostationary, polar. */
const ORBITS = [
  orbit(500, 500, 28.5),
  orbit(420, 420, 51.6),
  orbit(600, 600, 97.79),
  orbit(185, 35_786, 6),
  orbit(800, 800, 90),
];

const stage = (propellantKg: number, dryKg: number, kn: number, vacuumS: number, seaLevelS?: number) => ({
  dryMass: kilograms(dryKg),
  propellantMass: kilograms(propellantKg),
  vacuumThrust: newtons(kn * 1000),
  vacuumImpulse: seconds(vacuumS),
  seaLevelImpulse: seaLevelS === undefined ? undefined : seconds(seaLevelS),
});

const VEHICLE: Vehicle = {
  fairingMass: kilograms(1350),
  fairingLeavesAfterStage: 1,
  reserve: metresPerSecond(60),
  losses: { gravity: metresPerSecond(1310), drag: metresPerSecond(60), steering: metresPerSecond(30) },
  boosters: { count: 2, ...stage(26_000, 2700, 600, 279, 252) },
  stages: [stage(180_000, 12_700, 3350, 311, 283), stage(36_500, 3000, 390, 345)],
};

const SETTINGS: FlightSettings = { turnSpeedFraction: 0.6 };

function sitesOf(sectors: boolean): Site[] {
  const random = uniforms(7);
  const next = () => random.next().value;
  const sector = (): Sector => {
    const from = next() * 300;
    return { from: fromDegrees(from), to: fromDegrees(from + 20 + next() * 40) };
  };
  return Array.from({ length: SITES }, () => ({
    latitude: fromDegrees(next() * 120 - 55),
    longitude: fromDegrees(next() * 360 - 180),
    height: metres(next() * 500),
    sectors: sectors ? Array.from({ length: 1 + Math.floor(next() * 2) }, sector) : [],
  }));
}

/** One result at a time, each an object with its budget and the ways not taken. */
function objectRun(sites: readonly Site[]): number {
  const pads = sites.map(padOf);
  const targets = ORBITS.map(targetOf);
  const solver = new PayloadSolver(VEHICLE);
  return pads.flatMap((pad) => targets.map((target) => flightOf(pad, target, solver, SETTINGS))).length;
}

const tableRun = (sites: readonly Site[]): number => {
  const table = evaluateFlights(sites, ORBITS, VEHICLE, SETTINGS);
  return table.pads.length * table.targets.length;
};

/** Results per millisecond in the best of some rounds: what else the machine does counts least there. */
function rate(run: (sites: readonly Site[]) => number, sites: readonly Site[]): number {
  const rates = Array.from({ length: ROUNDS }, () => {
    const from = performance.now();
    return run(sites) / (performance.now() - from);
  });
  return Math.max(...rates);
}

/** The batch, which leaves out the ways not taken, beside results made object by object with them; on one core. */
export async function benchFlight(): Promise<string[]> {
  const lines = [
    { name: 'without sectors', sites: sitesOf(false), goal: 400 },
    { name: 'with sectors', sites: sitesOf(true), goal: 200 },
  ].map(({ name, sites, goal }) => {
    const [batch, objects] = [rate(tableRun, sites), rate(objectRun, sites)];
    return `flight: sites ${name}: ${batch.toFixed(0)} results/ms (goal ${goal}), object by object ${objects.toFixed(0)}, ratio ${(batch / objects).toFixed(1)}`;
  });
  return Promise.resolve(lines);
}

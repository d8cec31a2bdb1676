import { describe, expect, test } from 'vitest';
import { AirTable } from '#core/flight/ascent/air-table.ts';
import { exponentialAir } from '#core/flight/ascent/atmosphere.ts';
import { Course } from '#core/flight/ascent/course.ts';
import { DRAG, Flyer, GRAVITY, IDEAL, MASS } from '#core/flight/ascent/flyer.ts';
import { GRAVITY_TURN, VERTICAL } from '#core/flight/ascent/modes.ts';
import type { Phase } from '#core/flight/ascent/stack.ts';
import { benchmarkCourse, emptyPhase, plainStack } from '#tests/support/ascents.ts';
import { reference } from '#tests/support/reference.ts';

const AXES = ['x', 'y', 'z', 'vx', 'vy', 'vz', 'mass'];

describe('the four-phase ascent, flown open-loop from its steering table', () => {
  const course = benchmarkCourse({ rise: 0.5, turn: 0.5, air: 0.5, space: 2, most: 10_000 });
  const { flyer } = course;
  const figures = new Map<string, number>([['0 lift-off mass', flyer.state[MASS]!]]);
  let pressure = 0;
  course.observer = () => {
    flyer.probe();
    pressure = Math.max(pressure, flyer.dynamicPressure);
  };
  for (const phase of course.stack.phases) {
    course.fly(phase, NaN);
    AXES.forEach((axis, k) => figures.set(`${Number(flyer.time.toFixed(4))} ${axis}`, flyer.state[k]!));
    course.drop(phase);
  }
  figures.set('924.1393 ideal', flyer.state[IDEAL]!);
  figures.set('924.1393 greatest dynamic pressure', pressure);
  figures.set('924.1393 final speed', Math.hypot(...flyer.state.subarray(3, 6)));

  test.each(reference('ascent-benchmark'))(
    '$time_s s: $quantity is $printed $unit',
    ({ time_s, quantity, expected, tolerance }) => {
      expect(figures.get(`${time_s} ${quantity}`)).toBeWithin(expected, tolerance);
    },
  );
});

/** A world without turning or flattening whose surface gravity is given. */
const still = (radius: number, gravity: number) => ({
  gravitationalParameter: gravity * radius * radius,
  equatorialRadius: radius,
  eccentricitySquared: 0,
  secondZonalHarmonic: 0,
  rotationRate: 0,
  standardGravity: gravity,
});

function onPad(flyer: Flyer, phase: Phase, mass: number): Course {
  const course = new Course(flyer, plainStack([phase], mass, 0.5));
  flyer.accounting = true;
  flyer.steering.up.set([1, 0, 0]);
  flyer.steering.along.set([0, 1, 0]);
  course.start(Float64Array.of(flyer.planet.equatorialRadius, 0, 0), 0);
  return course;
}

const sounding = reference('ascent-sounding');
test.each(sounding.filter(({ id }) => id !== 'C157'))(
  'a sounding flight: $quantity is $printed $unit',
  ({ quantity, expected, tolerance }) => {
    // So large a world that gravity does not fall off: at 24 km by 5e-7 of itself.
    const flyer = new Flyer(still(1e11, 9.80665), new AirTable(exponentialAir(0, 7000)), [[0, 0]]);
    const flow = 20;
    const burn: Phase = { ...emptyPhase, mainThrust: flow * 9.80665 * 250, mainFlow: flow, endMass: 400 };
    const course = onPad(flyer, burn, 1000);
    course.steps = { rise: 0.05, turn: 0.05, air: 0.05, space: 0.05, most: 10_000 };
    flyer.steering.mode = VERTICAL;
    const stack = { ...course.stack, verticalRise: 1000 };
    const up = new Course(flyer, stack);
    up.steps = course.steps;
    up.start(Float64Array.of(1e11, 0, 0), 0);
    up.fly(burn, 400);
    const speed = flyer.state[3]!;
    // On 1e11 m a float keeps 1.5e-5 m; over 600 steps that is still well inside the tolerances.
    const altitude = flyer.state[0]! - 1e11;
    const figures: Record<string, number> = {
      speed,
      altitude,
      'gravity loss': flyer.state[GRAVITY]!,
      apogee: altitude + speed ** 2 / (2 * 9.80665),
    };
    expect(figures[quantity]).toBeWithin(expected, tolerance);
  },
);

test.each(sounding.filter(({ id }) => id === 'C157'))(
  'full thrust, then a coast, through thick air: $printed radii at the top',
  ({ expected, tolerance }) => {
    // The normalised problem in metres: the radius is 6,400 km, gravity there 10 m/s², so a unit of speed is 8,000 m/s
    // and one of time 800 s; D = 310 v² exp(−500 (h − 1)), thrust 3.5, exhaust 0.5, mass 1 to 0.6.
    const [radius, gravity, unit] = [6.4e6, 10, 8000];
    const density = (2 * 310 * 1000 * gravity) / unit ** 2;
    const flyer = new Flyer(still(radius, gravity), new AirTable(exponentialAir(density, radius / 500)), [
      [0, 1],
    ]);
    const thrust = 3.5 * 1000 * gravity;
    const burn = {
      ...emptyPhase,
      mainThrust: thrust,
      mainFlow: thrust / (0.5 * unit),
      area: 1,
      endMass: 600,
    };
    const course = new Course(flyer, { ...plainStack([burn], 1000, 1), verticalRise: 1000 });
    course.steps = { rise: 0.05, turn: 0.05, air: 0.05, space: 0.05, most: 10_000 };
    flyer.steering.up.set([1, 0, 0]);
    course.start(Float64Array.of(radius, 0, 0), 0);
    course.fly(burn, 600);
    // The top is reached after 0.1873 units of time; what little speed is left there leads no farther.
    course.coast(0.187339 * 800 - flyer.time);
    const short = flyer.state[3]! ** 2 / (2 * gravity);
    expect(short).toBeLessThan(0.01);
    expect((flyer.state[0]! + short) / radius).toBeWithin(expected, tolerance);
  },
);

/** The textbook's gravity turn: 89.85° from 130 m on, to a mass ratio. */
function gravityTurn(massRatio: number): Record<string, number> {
  const radius = 6_378_000;
  const flyer = new Flyer(still(radius, 9.81), new AirTable(exponentialAir(1.225, 7500)), [[0, 0.5]]);
  const mass = 149_912 * 0.4536;
  const thrust = 1.4 * mass * 9.81;
  const flow = thrust / (390 * 9.81);
  // The textbook's script rounds π, which gives 19.634875 m².
  const area = 19.634875;
  const burn: Phase = { ...emptyPhase, mainThrust: thrust, mainFlow: flow, area, endMass: mass / massRatio };
  // [derived] 130 m are reached after 8.020041502 s.
  const rise = 8.020041502;
  const course = new Course(flyer, { ...plainStack([burn], mass, 0.5), verticalRise: rise });
  course.steps = { rise: 0.05, turn: 0.05, air: 0.1, space: 0.25, most: 10_000 };
  flyer.accounting = true;
  flyer.steering.up.set([1, 0, 0]);
  course.start(Float64Array.of(radius, 0, 0), 0);
  course.fly({ ...burn, duration: rise }, NaN);
  expect(flyer.state[0]! - radius).toBeWithin(130, 1e-4);
  const speed = flyer.state[3]!;
  const angle = (89.85 * Math.PI) / 180;
  flyer.state[3] = speed * Math.sin(angle);
  flyer.state[4] = speed * Math.cos(angle);
  flyer.steering.mode = GRAVITY_TURN;
  const figures: Record<string, number> = {};
  const points: [number, number][] = [];
  course.observer = () => {
    flyer.probe();
    points.push([flyer.time, flyer.dynamicPressure]);
  };
  course.fly(burn, burn.endMass);
  const [x, y, , vx, vy] = flyer.state as unknown as [number, number, number, number, number];
  const r = Math.hypot(x, y);
  const top = points.reduce((best, point, k) => (point[1] > points[best]![1] ? k : best), 0);
  const [[t0, q0], [t1, q1], [t2, q2]] = [points[top - 1]!, points[top]!, points[top + 1]!];
  // The top of the parabola through three points of equal spacing.
  const shift = (q0 - q2) / (2 * (q0 - 2 * q1 + q2));
  expect(t2 - t1).toBeWithin(t1 - t0, 1e-9);
  figures['greatest dynamic pressure'] = q1 - ((q0 - q2) * shift) / 4;
  figures['time of greatest dynamic pressure'] = t1 + shift * (t2 - t1);
  figures['burn time'] = flyer.time;
  figures['speed'] = Math.hypot(vx, vy);
  figures['flight-path angle'] = (Math.asin((x * vx + y * vy) / (r * Math.hypot(vx, vy))) * 180) / Math.PI;
  // The textbook lets the vehicle drift while it rises at 89.85°: 130 m × cot 89.85°.
  figures['downrange'] = radius * Math.atan2(y, x) + 130 / Math.tan(angle);
  figures['altitude'] = r - radius;
  figures['drag loss'] = flyer.state[DRAG]!;
  figures['gravity loss'] = flyer.state[GRAVITY]!;
  return figures;
}

describe('the textbook’s gravity turn', () => {
  const flown: Record<string, Record<string, number>> = { 7: gravityTurn(7), 15: gravityTurn(15) };
  test.each(reference('ascent-gravity-turn'))(
    'mass ratio $mass_ratio: $quantity is $printed $unit',
    ({ mass_ratio, quantity, expected, tolerance }) => {
      expect(flown[mass_ratio]![quantity]).toBeWithin(expected, tolerance);
    },
  );
});

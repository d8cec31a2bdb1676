import { describe, expect, test } from 'vitest';
import { AirTable } from '#core/flight/ascent/air-table.ts';
import { exponentialAir, standardAir } from '#core/flight/ascent/atmosphere.ts';
import { Course } from '#core/flight/ascent/course.ts';
import {
  BACK_PRESSURE,
  CENTRIFUGAL,
  DRAG,
  Flyer,
  GRAVITY,
  IDEAL,
  MASS,
  STEERING,
} from '#core/flight/ascent/flyer.ts';
import { EARTH, geodeticOf } from '#core/flight/ascent/planet.ts';
import type { Planet } from '#core/flight/ascent/planet.ts';
import { meridianOf } from '#core/flight/earth.ts';
import { fromDegrees, metres } from '#core/units.ts';
import { emptyPhase, plainStack } from '#tests/support/ascents.ts';

const vacuum = new AirTable(exponentialAir(0, 7000));
const MU = EARTH.gravitationalParameter;

function coasting(planet: Planet): Course {
  const course = new Course(new Flyer(planet, vacuum, [[0, 0.4]]), plainStack([emptyPhase], 1000, 0.4));
  course.start(Float64Array.of(planet.equatorialRadius + 200_000, 0, 0), 0);
  // An ellipse of 200 × 1,500 km or so, inclined.
  course.flyer.state.set([0, 6100, 5300], 3);
  return course;
}

describe('a coast', () => {
  const round: Planet = { ...EARTH, secondZonalHarmonic: 0, eccentricitySquared: 0 };
  const energy = ({ flyer: { state } }: Course) =>
    (state[3]! ** 2 + state[4]! ** 2 + state[5]! ** 2) / 2 - MU / Math.hypot(state[0]!, state[1]!, state[2]!);
  const momentum = ({ flyer: { state } }: Course) =>
    [
      [1, 2, 5, 4],
      [2, 0, 3, 5],
      [0, 1, 4, 3],
    ].map(([a, b, c, d]) => state[a!]! * state[c!]! - state[b!]! * state[d!]!);

  test('keeps energy and angular momentum to 1e-9 for a quarter of an hour', () => {
    const course = coasting(round);
    const [before, turning] = [energy(course), momentum(course)];
    course.coast(900);
    expect(energy(course) / before).toBeWithin(1, 1e-9);
    momentum(course).forEach((part, k) => {
      expect((part - turning[k]!) / Math.hypot(...turning)).toBeWithin(0, 1e-9);
    });
  });

  test('under J₂ keeps the energy of that field and the momentum about the axis', () => {
    const course = coasting(EARTH);
    // [derived] U = −μ/r (1 − J₂ (a/r)² (3 sin²φ′ − 1)/2), conserved with v²/2.
    const whole = () => {
      const { state } = course.flyer;
      const r = Math.hypot(state[0]!, state[1]!, state[2]!);
      const s2 = (state[2]! / r) ** 2;
      const oblate = (EARTH.secondZonalHarmonic * (EARTH.equatorialRadius / r) ** 2 * (3 * s2 - 1)) / 2;
      return energy(course) + (MU / r) * oblate;
    };
    const [before, about] = [whole(), momentum(course)[2]!];
    course.coast(900);
    expect(whole() / before).toBeWithin(1, 1e-9);
    expect(momentum(course)[2]! / about).toBeWithin(1, 1e-9);
  });

  test('follows Kepler: half a period leads to the other apse', () => {
    // [derived] From perigee at 200 km with apogee at 1,000 km, T = 2π √(a³/μ).
    const course = coasting(round);
    const [rp, ra] = [EARTH.equatorialRadius + 200_000, EARTH.equatorialRadius + 1_000_000];
    const a = (rp + ra) / 2;
    course.flyer.state.set([0, Math.sqrt(MU * (2 / rp - 1 / a)), 0], 3);
    course.coast(Math.PI * Math.sqrt(a ** 3 / MU));
    expect(course.flyer.state[0]!).toBeWithin(-ra, 0.5);
    expect(course.flyer.state[1]!).toBeWithin(0, 0.5);
  });
});

describe('the Runge–Kutta step', () => {
  test('is of order four: half the step, a sixteenth of the error', () => {
    const ends = [32, 16, 8, 4, 1].map((longest) => {
      const course = coasting(EARTH);
      course.steps = { rise: longest, turn: longest, air: longest, space: longest, most: 10_000 };
      course.coast(640);
      return course.flyer.state.slice(0, 3);
    });
    const last = ends.pop()!;
    const errors = ends.map((end) => Math.hypot(end[0]! - last[0]!, end[1]! - last[1]!, end[2]! - last[2]!));
    const orders = errors.slice(1).map((error, k) => Math.log2(errors[k]! / error));
    for (const order of orders) expect(order).toBeWithin(4, 0.25);
  });
});

describe('linear-tangent steering', () => {
  test('in a vacuum over a flat Earth follows its closed form', () => {
    // Constant acceleration: [derived] with T = tan θ, v_x = (α/b)(asinh T₀ − asinh T), v_y = (α/b)(sec θ₀ − sec θ) − g t
    // (Bryson & Ho, Applied Optimal Control, section 2.4, [from memory]). A world of 1e12 m is flat to 0.1 m in 400 km.
    const [radius, g, alpha, seconds] = [1e12, 9.8, 20, 200];
    const flat: Planet = {
      ...EARTH,
      gravitationalParameter: g * radius * radius,
      equatorialRadius: radius,
      eccentricitySquared: 0,
      secondZonalHarmonic: 0,
      rotationRate: 0,
    };
    const phase = { ...emptyPhase, mainThrust: alpha * 1000, duration: seconds };
    const course = new Course(new Flyer(flat, vacuum, [[0, 0]]), plainStack([phase], 1000, 0));
    course.steps = { rise: 0.5, turn: 0.5, air: 0.5, space: 0.5, most: 10_000 };
    course.start(Float64Array.of(radius, 0, 0), 0);
    // Just enough of a flight eastward to tell the plane.
    const { state } = course.flyer;
    state[4] = 1e-3;
    const [first, last] = [1.4, -0.2];
    course.flyer.steering.beginTangent(0, state, first, last, 0, seconds);
    course.fly(phase, NaN);
    const b = (first - last) / seconds;
    const sec = (tangent: number) => Math.sqrt(1 + tangent * tangent);
    const east = (alpha / b) * (Math.asinh(first) - Math.asinh(last));
    const up = (alpha / b) * (sec(first) - sec(last)) - g * seconds;
    expect(state[4]! - 1e-3).toBeWithin(east, 5e-4);
    expect(state[3]!).toBeWithin(up, 1e-3);
    const distance =
      (alpha / b ** 2) * (sec(first) - sec(last) - last * (Math.asinh(first) - Math.asinh(last)));
    expect(state[1]! - 1e-3 * seconds).toBeWithin(distance, 0.01);
  });
});

describe('the account of a powered flight', () => {
  test('closes along the air-relative velocity, throttled, shaken and turned as it may be', () => {
    const flyer = new Flyer(EARTH, new AirTable(standardAir), [
      [0, 0.3],
      [0.8, 0.35],
      [1.2, 0.7],
      [3, 0.4],
    ]);
    const phase = {
      ...emptyPhase,
      fixedThrust: 4e5,
      fixedFlow: 150,
      mainThrust: 1.2e6,
      mainFlow: 400,
      exitArea: 1.6,
      area: 8,
      accelerationLimit: 32,
      endMass: 30_000,
    };
    const stack = {
      ...plainStack([phase], 100_000, 0.4),
      verticalRise: 7,
      kick: 9,
      dynamicPressureLimit: 31_000,
    };
    const course = new Course(flyer, stack);
    flyer.accounting = true;
    const { axisDistance, z } = meridianOf(fromDegrees(-31), metres(120));
    course.start(Float64Array.of(axisDistance, 0, z), 0);
    flyer.steering.up.set([Math.cos(fromDegrees(-31)), 0, Math.sin(fromDegrees(-31))]);
    flyer.steering.along.set([0, 1, 0]);
    flyer.steering.tiltRate = 0.012;
    let [pressure, acceleration] = [0, 0];
    course.observer = () => {
      flyer.probe();
      pressure = Math.max(pressure, flyer.dynamicPressure);
      if (flyer.time > 1) acceleration = Math.max(acceleration, flyer.thrust / flyer.state[MASS]!);
    };
    course.fly(phase, 40_000);
    flyer.steering.beginTangent(flyer.time, flyer.state, 0.6, 0.1, 0.3, 60);
    course.fly({ ...phase, fixedThrust: 0, fixedFlow: 0 }, 30_000);
    const { state } = flyer;
    const spent = state[GRAVITY]! + state[DRAG]! + state[STEERING]! + state[BACK_PRESSURE]!;
    expect(flyer.relativeSpeed() + spent - state[CENTRIFUGAL]!).toBeWithin(state[IDEAL]!, 0.05);
    for (const line of [GRAVITY, DRAG, STEERING, BACK_PRESSURE, CENTRIFUGAL]) {
      expect(state[line]!).toBeGreaterThan(1);
    }
    // Both limits were met and held.
    expect(pressure).toBeWithin(31_000, 20);
    expect(acceleration).toBeGreaterThan(31.5);
    expect(acceleration).toBeLessThan(32.0001);
  });
});

describe('places on the ellipsoid', () => {
  test.each([-90, -63.2, -0.001, 0, 28.5, 45, 89.99, 90])(
    'latitude %s° comes back with its height',
    (latitude) => {
      for (const height of [-400, 0, 6000, 185_000]) {
        const { axisDistance, z } = meridianOf(fromDegrees(latitude), metres(height));
        const found = geodeticOf(EARTH, axisDistance, z);
        expect(found.latitude).toBeWithin(fromDegrees(latitude), 1e-12);
        expect(found.height).toBeWithin(height, 1e-6);
        const flyer = new Flyer(EARTH, vacuum, [[0, 0.4]]);
        flyer.state.set([axisDistance, 0, z, 0, 0, 0, 1]);
        flyer.probe();
        expect(flyer.height).toBeWithin(height, Math.max(0.001, 2e-7 * height));
      }
    },
  );
});

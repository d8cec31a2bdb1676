import { expect, test } from 'vitest';
import { AscentVehicle } from '#contract/ascent.ts';
import { toAscentVehicle } from '#contract/to-ascent.ts';
import { AirTable } from '#core/flight/ascent/air-table.ts';
import { standardAir } from '#core/flight/ascent/atmosphere.ts';
import { Course } from '#core/flight/ascent/course.ts';
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
import { fromDegrees, metres } from '#core/units.ts';
import library from '#seed/vehicles.json' with { type: 'json' };
import { plainAscent } from '#tests/support/plain-ascent.ts';

const air = new AirTable(standardAir);

test.each([
  ['ALDER-S', 270, -32],
  ['ROWAN-M', 9500, 8],
])('%s flies as the equations of motion written out a second time do', (code, payload, latitudeDeg) => {
  const found = library.vehicles.find((vehicle) => vehicle.code === code);
  const stack = stackOf(toAscentVehicle(AscentVehicle.parse(found)));
  const latitude = fromDegrees(latitudeDeg);
  const course = new Course(new Flyer(EARTH, air, stack.drag), stack);
  const problem = new Operational(
    course,
    launchPointOf({ latitude, height: metres(0) }),
    injectionGoal(6_563_137, 7793),
    payloadSizing(stack, () => 100),
    [],
    undefined,
    1,
  );
  const chosen = { tilt: 0.12, azimuth: 0.7, firstTangent: 0.45, lastTangent: -0.05, yaw: 0.1 };
  problem.all[TILT] = chosen.tilt;
  problem.all[AZIMUTH] = chosen.azimuth;
  problem.all[SIZE] = payload;
  problem.all[FIRST_TANGENT] = chosen.firstTangent;
  problem.all[LAST_TANGENT] = chosen.lastTangent;
  problem.all[YAW] = chosen.yaw;
  expect(problem.flyFirst() && problem.flyUpper()).toBe(true);
  const { state, time } = course.flyer;
  const plain = plainAscent(stack, {
    ...chosen,
    latitude,
    payload,
    tangentDuration: problem.tangentDuration,
    endMass: state[MASS]!,
  });
  expect(plain.time).toBeWithin(time, 1e-5);
  // Core's table of the air rounds the corners of its layers: metres after 400 s, no more.
  const apart = (from: number, b: readonly number[]) =>
    Math.hypot(state[from]! - b[0]!, state[from + 1]! - b[1]!, state[from + 2]! - b[2]!);
  expect(apart(0, plain.place)).toBeLessThan(5);
  expect(apart(3, plain.velocity)).toBeLessThan(0.02);
  // With steps a quarter as long it comes to the same place: what the steps leave out, the air's table aside, is metres as well.
  const coarse = state.slice();
  course.steps = { rise: 0.5, turn: 0.25, air: 1, space: 4, most: 2000 };
  expect(problem.flyFirst() && problem.flyUpper()).toBe(true);
  const moved = (from: number) =>
    Math.hypot(
      state[from]! - coarse[from]!,
      state[from + 1]! - coarse[from + 1]!,
      state[from + 2]! - coarse[from + 2]!,
    );
  expect(moved(0)).toBeLessThan(12);
  expect(moved(3)).toBeLessThan(0.04);
});

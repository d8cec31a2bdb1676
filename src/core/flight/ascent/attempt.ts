import { planeChangeCost } from '../injection.ts';
import type { Injection, Target } from '../injection.ts';
import type { Pad } from '../pad.ts';
import type { FlownWay } from '../types.ts';
import type { Course } from './course.ts';
import { injectionGoal } from './goal.ts';
import type { LaunchPoint } from './launch-point.ts';
import { Operational, payloadSizing } from './operational.ts';

/** One target from one pad by one way, ready to be searched. */
export interface Attempt {
  readonly course: Course;
  readonly launch: LaunchPoint;
  readonly pad: Pad;
  readonly target: Target;
  readonly injection: Injection;
  readonly way: FlownWay;
  /** Radius at injection, m. */
  readonly radius: number;
  /** Δv kept in reserve, m/s. */
  readonly reserve: number;
  /** Air-relative speed at which the site's sectors are checked, m/s. */
  readonly headingSpeed: number;
}

/** Whether the inclination flown is an outcome, the rest owed as a plane change in orbit. */
export const changesPlane = ({ way }: Attempt): boolean => way.kind === 'plane-change';

/** Δv still to be burnt after injection into a plane: transfer, reserve, and the plane change where the way has one. */
export function afterInjection(attempt: Attempt): (inclination: number) => number {
  const { injection, target, reserve } = attempt;
  const kept = injection.transfer + reserve;
  if (!changesPlane(attempt)) return () => kept;
  return (inclination) => kept + planeChangeCost(injection, Math.abs(target.inclination - inclination));
}

/**
 * The flight as a shooting problem.
 * @param active the variables that may be chosen
 * @param pinned heading to be flown, rad; undefined where it is free
 */
export function problemOf(
  attempt: Attempt,
  active: readonly number[],
  pinned: number | undefined,
): Operational {
  const { course, launch, injection, radius } = attempt;
  course.headingSpeed = pinned === undefined ? 0 : attempt.headingSpeed;
  return new Operational(
    course,
    launch,
    injectionGoal(radius, injection.speed),
    payloadSizing(course.stack, afterInjection(attempt)),
    active,
    pinned,
    course.stack.liftOffMass / 1000,
  );
}

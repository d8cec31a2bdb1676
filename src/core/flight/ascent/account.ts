import { BACK_PRESSURE, CENTRIFUGAL, DRAG, GRAVITY, IDEAL, STEERING } from './flyer.ts';
import type { Attempt } from './attempt.ts';
import { problemOf } from './attempt.ts';
import { inclinationFlownBy } from './goal.ts';
import { Trajectory } from './trajectory.ts';

/** Where the ideal Δv of a flight went, along the air-relative velocity, m/s. */
export interface FlownLosses {
  readonly gravity: number;
  readonly drag: number;
  readonly steering: number;
  readonly backPressure: number;
}

/** A flight flown once more, written down and accounted for. */
export interface Account {
  /** Seconds from lift-off to the end of the last burn. */
  readonly burnOut: number;
  /** Inclination flown, rad. */
  readonly inclination: number;
  /** Heading where the site's sectors are checked, clockwise from north, 0…2π. */
  readonly heading: number;
  /** Vacuum specific impulse throughout. */
  readonly ideal: number;
  readonly relativeSpeed: number;
  readonly losses: FlownLosses;
  readonly centrifugal: number;
  /** Required speed of the closed form for the plane flown, from this site. */
  readonly requiredSpeed: number;
  /** What the air-relative speed at burn-out differs by from that required speed. */
  readonly remainder: number;
  readonly trajectory: Trajectory;
  /** ideal − (air-relative speed + losses − centrifugal gain): what the account leaves open. */
  readonly open: number;
}

/** Section 4's required speed for a plane, due east or west where the site does not reach it. */
function requiredSpeed({ pad, injection }: Attempt, inclination: number): number {
  const ratio = pad.cosLatitude > 0 ? Math.cos(inclination) / pad.cosLatitude : 0;
  const sin = Math.min(1, Math.max(-1, ratio));
  const [v, e] = [injection.speed, pad.rotationSpeed];
  return Math.sqrt(v * v + e * e - 2 * v * e * sin);
}

/**
 * Flies what was found and accounts for it.
 * @returns undefined where it cannot be flown
 */
export function accountFor(attempt: Attempt, variables: Float64Array): Account | undefined {
  const { course } = attempt;
  const { flyer } = course;
  const problem = problemOf(attempt, [], undefined);
  problem.all.set(variables);
  const trajectory = new Trajectory();
  course.headingSpeed = attempt.headingSpeed;
  course.observer = (at) => {
    trajectory.note(at);
  };
  flyer.accounting = true;
  const flown = problem.flyFirst() && problem.flyUpper();
  flyer.accounting = false;
  course.observer = undefined;
  if (!flown) return undefined;
  const { state } = flyer;
  const inclination = inclinationFlownBy(state);
  const losses = {
    gravity: state[GRAVITY] as number,
    drag: state[DRAG] as number,
    steering: state[STEERING] as number,
    backPressure: state[BACK_PRESSURE] as number,
  };
  const ideal = state[IDEAL] as number;
  const centrifugal = state[CENTRIFUGAL] as number;
  const relativeSpeed = flyer.relativeSpeed();
  const required = requiredSpeed(attempt, inclination);
  const lost = losses.gravity + losses.drag + losses.steering + losses.backPressure;
  return {
    burnOut: flyer.time,
    inclination,
    heading: course.heading < 0 ? course.heading + 2 * Math.PI : course.heading,
    ideal,
    relativeSpeed,
    losses,
    centrifugal,
    requiredSpeed: required,
    remainder: relativeSpeed - required,
    trajectory,
    open: ideal - (relativeSpeed + lost - centrifugal),
  };
}

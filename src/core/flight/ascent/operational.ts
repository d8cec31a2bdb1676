import type { Course } from './course.ts';
import type { Goal } from './goal.ts';
import { injectionPoint } from './injection-point.ts';
import type { InjectionPoint } from './injection-point.ts';
import type { LaunchPoint } from './launch-point.ts';
import type { Shooting } from './shooting.ts';
import type { Phase, Stack } from './stack.ts';

/** The variables of the operational steering, by place. */
export const TILT = 0;
export const AZIMUTH = 1;
export const SIZE = 2;
export const FIRST_TANGENT = 3;
export const LAST_TANGENT = 4;
export const YAW = 5;
export const COAST = 6;
export const INCLINATION = 7;
export const VARIABLES = 8;

/** How the size of a flight, its payload or what it has left, sets where it ends. */
export interface Sizing {
  /** Payload aboard for a size. */
  readonly payload: (size: number) => number;
  /**
   * Where the last burn ends.
   * @param inclination flown, which the plane change still owed follows from
   * @returns false where there is no such point
   */
  readonly end: (size: number, inclination: number, point: InjectionPoint) => boolean;
  /** Whether the first stage's flight depends on the size. */
  readonly fromLiftOff: boolean;
}

/**
 * The size is the payload; what is left at injection gives the Δv still to be burnt.
 * @param after that Δv in m/s, by the inclination flown
 */
export function payloadSizing(stack: Stack, after: (inclination: number) => number): Sizing {
  return {
    payload: (size) => size,
    end: (size, inclination, point) => injectionPoint(stack, size, after(inclination), point),
    fromLiftOff: true,
  };
}

/** The size is the mass left at the end of the last phase, payload and fairing counted; the payload is fixed. */
export function residualSizing(stack: Stack, payload: number): Sizing {
  const last = stack.phases.length - 1;
  const empty = (stack.phases[last] as Phase).endMass + payload + stack.fairingMass;
  return {
    payload: () => payload,
    end: (size, _, point) => {
      point.phase = last;
      point.endMass = size;
      return size >= empty;
    },
    fromLiftOff: false,
  };
}

/** Tolerance of a heading that is to be flown, rad. */
const HEADING = 1e-6;

/** Shares of a variable's scale by which derivatives are taken. */
const STEP = 1e-6;

/**
 * Vertical rise, kick with free azimuth, gravity turn, then the linear tangent with a fixed yaw: the flight of section
 * 8 as a shooting problem. Only `active` variables may be chosen; the rest keep what they are given.
 */
export class Operational implements Shooting {
  readonly scales: Float64Array;
  readonly tolerances: Float64Array;
  readonly leanings: Float64Array;
  readonly lowest: Float64Array;
  readonly highest: Float64Array;
  readonly objective: number;
  /** All variables; the active ones are copied in before a flight. */
  readonly all = new Float64Array(VARIABLES);
  private readonly point: InjectionPoint = { phase: 0, endMass: 0 };
  private readonly firstUpper: number;
  private readonly nominalBurn: number;
  private readonly shifted: Float64Array;
  private readonly beside: Float64Array;

  constructor(
    readonly course: Course,
    private readonly launch: LaunchPoint,
    private readonly goal: Goal,
    private readonly sizing: Sizing,
    readonly active: readonly number[],
    /** Heading to be flown at the course's heading speed, rad; undefined where it is free. */
    private readonly pinned: number | undefined,
    sizeScale: number,
  ) {
    const scales = [0.005, 0.02, sizeScale, 0.05, 0.05, 0.05, 20, 0.01];
    const lowest = [1e-4, -Infinity, -Infinity, -3, -3, -2, 0, 0];
    const highest = [1.2, Infinity, Infinity, 3, 3, 2, 3000, Math.PI];
    const pick = (from: readonly number[]) => Float64Array.from(active, (k) => from[k] as number);
    this.scales = pick(scales);
    this.leanings = pick([1, 1, 1, 1, 1, 1, 1e-3, 1e3]);
    this.lowest = pick(lowest);
    this.highest = pick(highest);
    this.tolerances = Float64Array.from([...goal.tolerances, ...(pinned === undefined ? [] : [HEADING])]);
    this.objective = active.indexOf(SIZE);
    this.shifted = new Float64Array(active.length);
    this.beside = new Float64Array(this.tolerances.length);
    const { phases } = course.stack;
    this.firstUpper = phases.findIndex(({ stage }) => stage > 0);
    let before = this.firstUpper === 0 ? course.stack.liftOffMass : 0;
    let burn = 0;
    phases.forEach((phase, k) => {
      if (k >= this.firstUpper) burn += (before - phase.endMass) / phase.mainFlow;
      before = phase.endMass - phase.dropped;
    });
    this.nominalBurn = burn;
  }

  /** Seconds over which the tangent runs from its first to its last value. */
  get tangentDuration(): number {
    return this.nominalBurn;
  }

  private take(variables: Float64Array): void {
    this.active.forEach((place, k) => {
      this.all[place] = variables[k] as number;
    });
  }

  /** Rise, kick and gravity turn to where the upper stages begin. */
  flyFirst(): boolean {
    const { course, launch, all } = this;
    const { stack } = course;
    const { steering } = course.flyer;
    const payload = this.sizing.payload(all[SIZE] as number);
    const sin = Math.sin(all[AZIMUTH] as number);
    const cos = Math.cos(all[AZIMUTH] as number);
    for (let k = 0; k < 3; k++) {
      steering.up[k] = launch.up[k] as number;
      steering.along[k] = sin * (launch.east[k] as number) + cos * (launch.north[k] as number);
    }
    steering.tiltRate = (all[TILT] as number) / stack.kick;
    course.start(launch.place, payload);
    for (let k = 0; k < this.firstUpper; k++) {
      const phase = stack.phases[k] as Phase;
      if (!course.fly(phase, phase.endMass + payload + stack.fairingMass)) return false;
      course.drop(phase);
    }
    course.mark();
    return true;
  }

  /** From there to injection. */
  flyUpper(): boolean {
    const { course, all, point } = this;
    const { stack } = course;
    const payload = this.sizing.payload(all[SIZE] as number);
    if (!this.sizing.end(all[SIZE] as number, all[INCLINATION] as number, point)) return false;
    if ((all[COAST] as number) > 0 && !course.coast(all[COAST] as number)) return false;
    course.flyer.steering.beginTangent(
      course.flyer.time,
      course.flyer.state,
      all[FIRST_TANGENT] as number,
      all[LAST_TANGENT] as number,
      all[YAW] as number,
      this.nominalBurn,
    );
    for (let k = this.firstUpper; k <= point.phase; k++) {
      const phase = stack.phases[k] as Phase;
      const last = k === point.phase;
      if (!course.fly(phase, last ? point.endMass : phase.endMass + payload + stack.fairingMass))
        return false;
      if (!last) course.drop(phase);
    }
    return true;
  }

  private measure(conditions: Float64Array): void {
    const { course } = this;
    this.goal.measure(course.flyer.state, this.all[INCLINATION] as number, conditions);
    if (this.pinned === undefined) return;
    const off = course.heading - this.pinned;
    conditions[conditions.length - 1] = off - 2 * Math.PI * Math.round(off / (2 * Math.PI));
  }

  /** Whether a variable changes nothing before the upper stages begin. */
  private isUpper(place: number): boolean {
    return place > SIZE || (place === SIZE && !this.sizing.fromLiftOff);
  }

  evaluate(variables: Float64Array, conditions: Float64Array): boolean {
    this.take(variables);
    if (!this.flyFirst() || !this.flyUpper()) return false;
    this.measure(conditions);
    return conditions.every(Number.isFinite);
  }

  private column(
    k: number,
    variables: Float64Array,
    conditions: Float64Array,
    jacobian: Float64Array,
  ): boolean {
    const { shifted, beside, active } = this;
    const n = active.length;
    const step = STEP * (this.scales[k] as number);
    shifted.set(variables);
    shifted[k] = (variables[k] as number) + step;
    this.take(shifted);
    if (this.isUpper(active[k] as number)) this.course.resume();
    else if (!this.flyFirst()) return false;
    if (!this.flyUpper()) return false;
    this.measure(beside);
    for (let i = 0; i < conditions.length; i++) {
      jacobian[i * n + k] = ((beside[i] as number) - (conditions[i] as number)) / step;
    }
    return true;
  }

  differentiate(variables: Float64Array, conditions: Float64Array, jacobian: Float64Array): boolean {
    this.course.sameCuts = true;
    let flown = true;
    // Those that change the upper stages alone go first: they start from where the last flight's began.
    for (let k = this.active.length - 1; k >= 0 && flown; k--) {
      flown = this.column(k, variables, conditions, jacobian);
    }
    this.course.sameCuts = false;
    return flown;
  }
}

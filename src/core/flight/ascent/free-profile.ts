import type { Course } from './course.ts';
import type { Goal } from './goal.ts';
import type { LaunchPoint } from './launch-point.ts';
import { NODES } from './modes.ts';
import type { Shooting } from './shooting.ts';
import type { Phase } from './stack.ts';

/** A share of a variable's scale by which derivatives are taken. */
const STEP = 1e-6;

/** Where the pitch of a free profile may bend. */
export interface ProfileNodes {
  /** Seconds after lift-off, up to the start of the last phase, rising from 0; the last is that start. */
  readonly times: readonly number[];
  /** Equal parts into which the last phase is divided, however long it burns. */
  readonly parts: number;
  /** Yaw nodes, equally spaced over the whole flight. */
  readonly yaws: number;
}

/**
 * A flight whose pitch is free: straight between nodes in the launch site's frame as it stood at lift-off, the last
 * phase's nodes stretched over its burn; yaw straight between a few nodes. The variables are the mass at the end, then
 * the pitches, then the yaws. It is the steering of the optimal-control literature, beside the operational one: it
 * knows no angle of attack, so it tells what an operational flight could at most carry.
 * @see ascentReferences.ascentBenchmark, tests/core/flight/ascent/optimum.test.ts
 */
export class FreeProfile implements Shooting {
  readonly scales: Float64Array;
  readonly tolerances: Float64Array;
  readonly leanings: Float64Array;
  readonly lowest: Float64Array;
  readonly highest: Float64Array;
  readonly objective = 0;
  readonly pitches: number;
  private readonly shifted: Float64Array;
  private readonly beside: Float64Array;

  /**
   * @param payload kg
   * @param inclination the one to be flown, rad
   * @param massScale what one unit of the scaled final mass is worth, kg
   */
  constructor(
    private readonly course: Course,
    private readonly launch: LaunchPoint,
    private readonly goal: Goal,
    private readonly nodes: ProfileNodes,
    private readonly payload: number,
    private readonly inclination: number,
    massScale: number,
  ) {
    this.pitches = nodes.times.length + nodes.parts;
    const n = 1 + this.pitches + nodes.yaws;
    this.scales = new Float64Array(n).fill(0.05);
    this.scales[0] = massScale;
    this.tolerances = Float64Array.from(goal.tolerances);
    this.leanings = new Float64Array(n).fill(1);
    this.lowest = new Float64Array(n).fill(-Math.PI);
    this.highest = new Float64Array(n).fill(Math.PI);
    this.lowest[0] = 0;
    this.highest[0] = Infinity;
    this.shifted = new Float64Array(n);
    this.beside = new Float64Array(this.tolerances.length);
  }

  /** Seconds after lift-off of every pitch node, for a mass at the end. */
  nodeTimes(endMass: number): Float64Array {
    const { times, parts } = this.nodes;
    const start = times[times.length - 1] as number;
    const { phases } = this.course.stack;
    const last = phases[phases.length - 1] as Phase;
    const before = phases[phases.length - 2] as Phase;
    const burn = (before.endMass - before.dropped + this.payload - endMass) / last.mainFlow;
    return Float64Array.from({ length: this.pitches }, (_, k) =>
      k < times.length ? (times[k] as number) : start + ((k - times.length + 1) * burn) / parts,
    );
  }

  private steer(variables: Float64Array): void {
    const { steering } = this.course.flyer;
    const times = this.nodeTimes(variables[0] as number);
    const end = times[times.length - 1] as number;
    const last = this.nodes.yaws - 1;
    steering.nodeTimes = times;
    steering.nodePitch = variables.slice(1, 1 + this.pitches);
    // The yaw runs straight between its own few nodes: read off at the pitch's.
    steering.nodeYaw = times.map((time) => {
      const place = Math.min((time / end) * last, last);
      const low = Math.min(Math.floor(place), last - 1);
      const share = place - low;
      const yaw = (k: number) => variables[1 + this.pitches + k] as number;
      return (1 - share) * yaw(low) + share * yaw(low + 1);
    });
  }

  evaluate(variables: Float64Array, conditions: Float64Array): boolean {
    const { course, launch, payload } = this;
    const { phases } = course.stack;
    course.start(launch.place, payload);
    const { steering } = course.flyer;
    steering.up.set(launch.up);
    steering.along.set(launch.east);
    this.steer(variables);
    steering.mode = NODES;
    for (let k = 0; k < phases.length; k++) {
      const phase = phases[k] as Phase;
      const last = k === phases.length - 1;
      const endMass = phase.endMass + payload + course.stack.fairingMass;
      if (!course.fly(phase, last ? (variables[0] as number) : endMass)) return false;
      if (!last) course.drop(phase);
    }
    this.goal.measure(course.flyer.state, this.inclination, conditions);
    return conditions.every(Number.isFinite);
  }

  differentiate(variables: Float64Array, conditions: Float64Array, jacobian: Float64Array): boolean {
    const n = variables.length;
    this.course.sameCuts = true;
    let flown = true;
    for (let k = 0; k < n && flown; k++) {
      const step = STEP * (this.scales[k] as number);
      this.shifted.set(variables);
      this.shifted[k] = (variables[k] as number) + step;
      flown = this.evaluate(this.shifted, this.beside);
      for (let i = 0; i < conditions.length; i++) {
        jacobian[i * n + k] = ((this.beside[i] as number) - (conditions[i] as number)) / step;
      }
    }
    this.course.sameCuts = false;
    return flown;
  }
}

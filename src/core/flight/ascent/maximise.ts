import { Elimination } from './elimination.ts';
import { QuasiNewton } from './quasi-newton.ts';
import type { Shooting } from './shooting.ts';

/** How a search ended. */
export type Outcome = 'converged' | 'cannot-be-flown' | 'no-progress' | 'too-many-steps';

export interface Search {
  readonly outcome: Outcome;
  readonly iterations: number;
  /** Largest condition left, in tolerances. */
  readonly residual: number;
}

export interface SearchLimits {
  readonly iterations: number;
  /** Gain of the objective, in its own unit, that is not worth another step. */
  readonly gain: number;
  /** Largest step of a scaled variable. */
  readonly stride: number;
}

const HALVINGS = 12;
/** Conditions this far off, in tolerances, are met first; the free variables wait. */
const FAR = 3000;
/** First step of the free variables, before any curvature is known. */
const FIRST_STEP = 1;

/**
 * Makes one variable as large as can be while conditions hold, by damped Newton steps in the variables that the
 * conditions fix and quasi-Newton steps in those they leave free.
 *
 * Each turn takes the Jacobian once; it gives the Newton step, and how the solved variables follow the free ones, hence
 * the objective's slope along the conditions. A step is halved until an exact penalty falls. Everything is counted, so
 * it ends.
 * @see ascentReferences.reducedHessian, tests/core/flight/ascent/maximise.test.ts
 */
export class Maximiser {
  readonly variables: Float64Array;
  private readonly conditions: Float64Array;
  private readonly trialConditions: Float64Array;
  private readonly trial: Float64Array;
  private readonly step: Float64Array;
  private readonly jacobian: Float64Array;
  private readonly weights: Float64Array;
  private readonly algebra: Elimination;
  private hessian: QuasiNewton;
  private slope: Float64Array;
  private lastSlope: Float64Array;
  private move: Float64Array;
  private picked = false;

  constructor(private readonly problem: Shooting) {
    const n = problem.scales.length;
    const m = problem.tolerances.length;
    this.variables = new Float64Array(n);
    this.trial = new Float64Array(n);
    this.step = new Float64Array(n);
    this.conditions = new Float64Array(m);
    this.trialConditions = new Float64Array(m);
    this.weights = new Float64Array(m);
    this.jacobian = new Float64Array(m * n);
    // The objective is told by the conditions: only then has it a slope along them.
    const leanings = problem.leanings.slice();
    leanings[problem.objective] = 1e6;
    this.algebra = new Elimination(n, m, leanings);
    this.hessian = new QuasiNewton(n - m);
    this.slope = new Float64Array(n - m);
    this.lastSlope = new Float64Array(n - m);
    this.move = new Float64Array(n - m);
  }

  private residual(conditions: Float64Array): number {
    return conditions.reduce(
      (most, left, i) => Math.max(most, Math.abs(left) / (this.problem.tolerances[i] as number)),
      0,
    );
  }

  /** What the search makes small: the objective turned round, and every condition left, weighed. */
  private penalty(variables: Float64Array, conditions: Float64Array): number {
    const { problem, weights } = this;
    const { objective, scales, tolerances } = problem;
    let sum = -(variables[objective] as number) / (scales[objective] as number);
    for (let i = 0; i < conditions.length; i++) {
      sum += ((weights[i] as number) * Math.abs(conditions[i] as number)) / (tolerances[i] as number);
    }
    return sum;
  }

  private eliminate(): boolean {
    const { algebra, problem } = this;
    const fill = () => algebra.fill(this.jacobian, this.conditions, problem.scales, problem.tolerances);
    fill();
    if (this.picked && algebra.again()) return true;
    if (this.picked) fill();
    this.hessian = new QuasiNewton(this.hessian.n);
    this.move.fill(0);
    this.picked = algebra.pick();
    return this.picked;
  }

  /** Slope of the objective along the conditions, and the weights that make the penalty exact. */
  private takeSlope(): void {
    const { algebra, problem, slope, lastSlope } = this;
    const { objective, lowest, highest } = problem;
    lastSlope.set(slope);
    const solved = algebra.solved.includes(objective);
    const row = algebra.row(objective);
    algebra.free.forEach((column, k) => {
      const rise = solved ? -algebra.at(row, column) : column === objective ? 1 : 0;
      const at = this.variables[column] as number;
      const outward =
        (rise < 0 && at <= (lowest[column] as number)) || (rise > 0 && at >= (highest[column] as number));
      slope[k] = outward ? 0 : rise;
    });
    for (let i = 0; i < algebra.m; i++) {
      const price = solved ? Math.abs(algebra.at(row, algebra.n + 1 + i)) : 0;
      this.weights[i] = Math.max(2 * price, 0.5 * (this.weights[i] as number), 1e-9);
    }
  }

  /** The step of the free variables into `move`. */
  private takeMove(far: boolean): void {
    const { slope, move, hessian } = this;
    if (far) {
      move.fill(0);
      return;
    }
    if (hessian.learnt) {
      hessian.apply(slope, move);
      return;
    }
    const length = Math.hypot(...slope);
    for (let k = 0; k < slope.length; k++) {
      move[k] = length > 0 ? (FIRST_STEP * (slope[k] as number)) / length : 0;
    }
  }

  private takeStep(stride: number): void {
    const { algebra, step, move } = this;
    step.fill(0);
    algebra.free.forEach((column, k) => {
      step[column] = move[k] as number;
    });
    for (const column of algebra.solved) {
      const row = algebra.row(column);
      let sum = algebra.at(row, algebra.n);
      algebra.free.forEach((free, k) => {
        sum -= algebra.at(row, free) * (move[k] as number);
      });
      step[column] = sum;
    }
    const longest = step.reduce((most, part) => Math.max(most, Math.abs(part)), 0);
    if (longest > stride)
      for (let j = 0; j < step.length; j++) step[j] = ((step[j] as number) * stride) / longest;
  }

  /** Tries shares of the step until the penalty falls. */
  private advance(gain: number): boolean {
    const { problem, variables, trial, step, conditions, trialConditions } = this;
    const before = this.penalty(variables, conditions);
    const near = gain / (problem.scales[problem.objective] as number);
    for (let halving = 0, share = 1; halving < HALVINGS; halving++, share /= 2) {
      for (let j = 0; j < trial.length; j++) {
        const to = (variables[j] as number) + share * (step[j] as number) * (problem.scales[j] as number);
        trial[j] = Math.min(Math.max(to, problem.lowest[j] as number), problem.highest[j] as number);
      }
      if (!problem.evaluate(trial, trialConditions)) continue;
      const [was, is] = [this.residual(conditions), this.residual(trialConditions)];
      const settles = was <= 1 && is <= 1 ? near : 0;
      // Far off, what the objective loses on the way to the conditions is no matter.
      const nears = was > FAR && is < 0.9 * was;
      if (!nears && this.penalty(trial, trialConditions) >= before + settles) continue;
      this.algebra.free.forEach((column, k) => {
        this.move[k] =
          ((trial[column] as number) - (variables[column] as number)) / (problem.scales[column] as number);
      });
      variables.set(trial);
      conditions.set(trialConditions);
      return true;
    }
    return false;
  }

  private expectedGain(): number {
    const { slope, hessian, move, problem } = this;
    if (slope.every((rise) => rise === 0)) return 0;
    if (!hessian.learnt) return Infinity;
    hessian.apply(slope, move);
    const gain = move.reduce((sum, part, k) => sum + part * (slope[k] as number), 0) / 2;
    return gain * (problem.scales[problem.objective] as number);
  }

  /** Searches from the variables set in `variables`, where it also leaves what it found. */
  run(limits: SearchLimits): Search {
    const { problem, variables, conditions } = this;
    this.picked = false;
    this.weights.fill(0);
    if (!problem.evaluate(variables, conditions)) {
      return { outcome: 'cannot-be-flown', iterations: 0, residual: Infinity };
    }
    for (let turn = 1; turn <= limits.iterations; turn++) {
      const residual = this.residual(conditions);
      const ended = (outcome: Outcome): Search => ({ outcome, iterations: turn, residual });
      if (!problem.differentiate(variables, conditions, this.jacobian)) return ended('cannot-be-flown');
      if (!this.eliminate()) return ended('no-progress');
      this.takeSlope();
      if (turn > 1 && this.move.some((part) => part !== 0)) {
        const fallen = this.lastSlope.map((before, k) => before - (this.slope[k] as number));
        this.hessian.learn(this.move, fallen);
      }
      if (residual <= 1 && this.expectedGain() <= limits.gain) return ended('converged');
      this.takeMove(residual > FAR);
      this.takeStep(limits.stride);
      if (this.advance(limits.gain)) continue;
      return ended(residual <= 1 && this.expectedGain() <= 20 * limits.gain ? 'converged' : 'no-progress');
    }
    const residual = this.residual(conditions);
    return { outcome: 'too-many-steps', iterations: limits.iterations, residual };
  }
}

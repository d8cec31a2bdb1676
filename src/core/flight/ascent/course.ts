import { rootBetween } from '../brent.ts';
import type { Flyer } from './flyer.ts';
import { ACCOUNTED, MASS } from './flyer.ts';
import {
  ACCELERATION_HELD,
  COASTING,
  FULL,
  GRAVITY_TURN,
  KICK,
  LINEAR_TANGENT,
  NODES,
  PRESSURE_HELD,
  VERTICAL,
} from './modes.ts';
import { INSTANT, poweredStep, stepAt, STEPS, turnSettles } from './pace.ts';
import type { Steps } from './pace.ts';
import type { Phase, Stack } from './stack.ts';

/** A vehicle this far below the ellipsoid has come down. */
const DOWN = -1000;
/** The fairing stays on below this height, whatever the heating. */
const THICK_AIR = 45_000;
/** Stretches in one flight, more than any ascent has: past them it is given up. */
const MOST_STRETCHES = 64;

/** Told of every state passed through: the start of each phase, and each step. */
export type Observer = (flyer: Flyer) => void;

/**
 * Flies the phases of a stack, in fixed steps between events that are exactly located: those known beforehand in time
 * or mass (ends of burns, of the rise and the kick, the start of the acceleration limit) end a stretch of steps, the
 * others (dynamic pressure at its limit and off it, the fairing's heating, a given speed) are found within the step in
 * which they fall.
 */
export class Course {
  payload = 0;
  /** Fairing still aboard. */
  fairing = 0;
  /** Air-relative speed at which the heading is read, m/s; 0 where it is not wanted. */
  headingSpeed = 0;
  /** Clockwise from north, rad; NaN until the speed is reached. */
  heading = NaN;
  observer: Observer | undefined;
  steps: Steps = STEPS;
  /** Flights from lift-off since the object was made, and steps. */
  flights = 0;
  count = 0;
  /**
   * Whether stretches are cut into as many steps as in the last flight that was not so: flights that differ by a
   * derivative's small step must not differ by how they are cut.
   */
  sameCuts = false;
  private readonly cuts = new Int32Array(MOST_STRETCHES);
  private stretches = 0;
  private readonly before = new Float64Array(ACCOUNTED);
  private timeBefore = 0;
  private readonly marked = new Float64Array(ACCOUNTED);
  private markedTime = 0;
  private markedStretches = 0;
  private markedFairing = 0;

  constructor(
    readonly flyer: Flyer,
    readonly stack: Stack,
  ) {}

  /**
   * Puts the vehicle on its pad, at rest on the turning Earth.
   * @param place inertial position at lift-off in m
   */
  start(place: Float64Array, payload: number): void {
    const { flyer, stack } = this;
    const { state } = flyer;
    const omega = flyer.planet.rotationRate;
    this.payload = payload;
    this.fairing = stack.fairingMass;
    this.heading = NaN;
    this.stretches = 0;
    this.flights += 1;
    flyer.steering.mode = VERTICAL;
    flyer.time = 0;
    flyer.dynamicPressureLimit = stack.dynamicPressureLimit;
    state.fill(0);
    state.set(place);
    state[3] = -omega * (place[1] as number);
    state[4] = omega * (place[0] as number);
    state[MASS] = stack.liftOffMass + this.fairing + payload;
  }

  /** Notes where the vehicle is, for `resume`. */
  mark(): void {
    this.marked.set(this.flyer.state);
    this.markedTime = this.flyer.time;
    this.markedStretches = this.stretches;
    this.markedFairing = this.fairing;
  }

  /** Goes back to where `mark` was called. */
  resume(): void {
    this.flyer.state.set(this.marked);
    this.flyer.time = this.markedTime;
    this.stretches = this.markedStretches;
    this.fairing = this.markedFairing;
  }

  /** Coasts for some seconds. @returns false where the vehicle comes down */
  coast(seconds: number): boolean {
    const { flyer } = this;
    flyer.throttle = COASTING;
    flyer.probe();
    return this.stretch(seconds, stepAt(flyer, this.stack, this.steps));
  }

  /**
   * Flies a phase: by rise, kick and gravity turn until a tangent or nodes are begun.
   * @param endMass mass at its end, payload and fairing counted, where it does not end by the clock
   * @returns false where the vehicle comes down
   */
  fly(phase: Phase, endMass: number): boolean {
    const { flyer } = this;
    flyer.enter(phase);
    flyer.throttle = FULL;
    const clock = phase.duration === undefined ? NaN : flyer.time + phase.duration;
    for (let started = false; ; started = true) {
      const boundary = this.nextBoundary();
      const left = this.remaining(phase, endMass + this.fairing - this.stack.fairingMass, clock);
      if (!started) this.observer?.(flyer);
      if (left <= 0) break;
      const seconds = Math.min(left, boundary - flyer.time);
      if (!this.stretch(seconds, poweredStep(flyer, this.stack, this.steps, phase, seconds))) return false;
    }
    return true;
  }

  /** Leaves behind what a phase drops. */
  drop(phase: Phase): void {
    const { flyer } = this;
    let gone = phase.dropped;
    if (phase.dropsFairing) {
      gone += this.fairing;
      this.fairing = 0;
    }
    flyer.state[MASS] = (flyer.state[MASS] as number) - gone;
  }

  /** The next moment at which the steering has a corner; on the way up, what it does until then is set too. */
  private nextBoundary(): number {
    const { flyer, stack } = this;
    const { steering, time } = flyer;
    if (steering.mode === LINEAR_TANGENT) return Infinity;
    if (steering.mode === NODES) {
      return steering.nodeTimes.find((node) => node > time + INSTANT) ?? Infinity;
    }
    const { verticalRise, kick } = stack;
    if (time < verticalRise - INSTANT) {
      steering.mode = VERTICAL;
      return verticalRise;
    }
    steering.kickStart = verticalRise;
    const kicked = verticalRise + kick;
    steering.mode = time < kicked - INSTANT ? KICK : GRAVITY_TURN;
    if (steering.mode === KICK) return kicked;
    const settles = turnSettles(stack);
    return time < settles - INSTANT ? settles : Infinity;
  }

  /**
   * Seconds for which the throttle stays in its present mode, the mode chosen first.
   * @returns 0 where the phase is over
   */
  private remaining(phase: Phase, endMass: number, clock: number): number {
    const { flyer } = this;
    const m = flyer.state[MASS] as number;
    const flow = phase.fixedFlow + phase.mainFlow;
    const byClock = !Number.isNaN(clock);
    const full = byClock ? clock - flyer.time : (m - endMass) / flow;
    if (full <= INSTANT) {
      if (byClock) flyer.time = clock;
      else flyer.state[MASS] = endMass;
      return 0;
    }
    if (flyer.throttle === PRESSURE_HELD) return full;
    const limit = (phase.fixedThrust + phase.mainThrust) / phase.accelerationLimit;
    if (m > limit * (1 + 1e-12)) {
      flyer.throttle = FULL;
      return Math.min(full, (m - limit) / flow);
    }
    flyer.throttle = ACCELERATION_HELD;
    if (byClock) return full;
    const exhaust = phase.mainThrust / phase.mainFlow;
    return (exhaust / phase.accelerationLimit) * Math.log(m / endMass);
  }

  private keep(): void {
    this.before.set(this.flyer.state);
    this.timeBefore = this.flyer.time;
  }

  private again(h: number): void {
    this.flyer.state.set(this.before);
    this.flyer.time = this.timeBefore;
    this.flyer.step(h);
  }

  /** Equal steps over some seconds, cut short where the throttle's mode changes or the fairing leaves. */
  private stretch(seconds: number, longest: number): boolean {
    const { flyer } = this;
    const n = this.cutInto(seconds, longest);
    if (n > this.steps.most || this.stretches > MOST_STRETCHES) return false;
    const h = seconds / n;
    for (let k = 0; k < n; k++) {
      this.keep();
      flyer.step(h);
      this.count += 1;
      if (!(flyer.height > DOWN)) return false;
      if (this.headingSpeed > 0 && Number.isNaN(this.heading)) this.readHeading(h);
      const cut = this.pressureEvent(h) || this.heatingEvent(h);
      this.observer?.(flyer);
      if (cut) return true;
    }
    return true;
  }

  private cutInto(seconds: number, longest: number): number {
    const place = Math.min(this.stretches, MOST_STRETCHES - 1);
    this.stretches += 1;
    if (!this.sameCuts) this.cuts[place] = Math.max(1, Math.ceil(seconds / longest - 1e-9));
    return Math.max(this.cuts[place] as number, 1);
  }

  /** Steps to where a figure is zero within the step that was made; to its start where it does not change sign. */
  private locate(h: number, figure: () => number): void {
    const at = (part: number): number => {
      this.again(part);
      return figure();
    };
    const atStart = at(0);
    const atEnd = at(h);
    this.again(atStart * atEnd <= 0 ? rootBetween(at, 0, h, atStart, atEnd, 1e-9) : 0);
  }

  private readonly overPressure = (): number => {
    this.flyer.probe();
    return this.flyer.dynamicPressure - this.flyer.dynamicPressureLimit;
  };
  private readonly overThrottle = (): number => {
    this.flyer.probe();
    return this.flyer.holdingThrottle - 1;
  };

  private pressureEvent(h: number): boolean {
    const { flyer } = this;
    if (flyer.throttle === COASTING || flyer.dynamicPressureLimit === Infinity) return false;
    if (flyer.throttle === PRESSURE_HELD) {
      if (this.overThrottle() < 0) return false;
      this.locate(h, this.overThrottle);
      flyer.throttle = FULL;
      return true;
    }
    if (flyer.dynamicPressure < 0.98 * flyer.dynamicPressureLimit || this.overPressure() <= 0) return false;
    if (flyer.holdingThrottle >= 1) return false;
    this.again(0);
    if (this.overPressure() < 0) this.locate(h, this.overPressure);
    else this.again(0);
    flyer.throttle = PRESSURE_HELD;
    return true;
  }

  private readonly overHeating = (): number => {
    this.flyer.probe();
    const { dynamicPressure, airSpeed } = this.flyer;
    return dynamicPressure * airSpeed - this.stack.fairingHeating;
  };

  /** The fairing leaves when ½ρv³ has fallen below its limit, above the thick air. */
  private heatingEvent(h: number): boolean {
    if (this.stack.fairingHeating === 0 || this.fairing === 0 || this.flyer.height < THICK_AIR) return false;
    if (this.overHeating() > 0) return false;
    this.again(0);
    if (this.overHeating() > 0) this.locate(h, this.overHeating);
    this.flyer.state[MASS] = (this.flyer.state[MASS] as number) - this.fairing;
    this.fairing = 0;
    return true;
  }

  private readonly overSpeed = (): number => this.flyer.relativeSpeed() - this.headingSpeed;

  private readHeading(h: number): void {
    if (this.overSpeed() < 0) return;
    const end = this.flyer.state.slice();
    this.again(0);
    if (this.overSpeed() < 0) this.locate(h, this.overSpeed);
    this.heading = this.flyer.headingNow();
    this.flyer.state.set(end);
    this.flyer.time = this.timeBefore + h;
  }
}

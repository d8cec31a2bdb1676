import type { AirTable } from './air-table.ts';
import { ACCELERATION_HELD, COASTING, FULL, GRAVITY_TURN, PRESSURE_HELD } from './modes.ts';
import type { Planet } from './planet.ts';
import type { DragTable, Phase } from './stack.ts';
import { Steering } from './steering.ts';

/** Place of each figure in the state: inertial position and velocity, then mass. */
export const MASS = 6;
const STATE = 7;
/** Beside the state, when flights are accounted for: the Δv each line has taken so far. */
export const IDEAL = 7;
export const GRAVITY = 8;
export const DRAG = 9;
export const STEERING = 10;
export const BACK_PRESSURE = 11;
export const CENTRIFUGAL = 12;
export const ACCOUNTED = 13;

/** Seconds in which the dynamic pressure is drawn to its limit. */
const DRAWN_IN = 2;

/**
 * The equations of motion of a point mass over the turning Earth, and the Runge–Kutta step over them. One object is
 * reused for every flight: it holds the state, the steering's figures and all room it needs, and makes nothing.
 *
 * r″ = g(r) + T u/m − ½ρ|w|w C_D S/m with w = v − ω × r, g central plus J₂; T = vacuum thrust × throttle − pressure ×
 * exit area; m′ = −flow. Inertial frame: z along the Earth's axis, x in the meridian of longitude 0 at lift-off.
 * @see ascentReferences.pointMass and oblateGravity, tests/reference/ascent-gravity-turn.csv, ascent-benchmark.csv
 */
export class Flyer {
  /** Seconds since lift-off. */
  time = 0;
  readonly state = new Float64Array(ACCOUNTED);
  /** Whether the lines of the loss account are integrated as well. */
  accounting = false;

  readonly steering = new Steering();
  /** How the throttled engines run: a code of modes.ts. */
  throttle: number = FULL;
  dynamicPressureLimit = Infinity;

  /** What the last evaluation met on its way. */
  dynamicPressure = 0;
  airSpeed = 0;
  height = 0;
  thrust = 0;
  dragForce = 0;
  /** What those aboard feel, thrust and drag over mass, m/s²; only where flights are accounted for. */
  felt = 0;
  /** Throttle that would hold the dynamic pressure; over 1 where full thrust does not raise it. */
  holdingThrottle = Infinity;

  private fixedThrust = 0;
  private fixedFlow = 0;
  private mainThrust = 0;
  private mainFlow = 0;
  private exitArea = 0;
  private area = 0;
  private accelerationLimit = Infinity;

  private readonly machs: Float64Array;
  private readonly coefficients: Float64Array;
  private readonly trial = new Float64Array(ACCOUNTED);
  private readonly k1 = new Float64Array(ACCOUNTED);
  private readonly k2 = new Float64Array(ACCOUNTED);
  private readonly k3 = new Float64Array(ACCOUNTED);
  private readonly k4 = new Float64Array(ACCOUNTED);

  private readonly mu: number;
  private readonly omega: number;
  private readonly e2: number;
  private readonly polarRadius: number;
  private readonly j2Scale: number;

  constructor(
    readonly planet: Planet,
    readonly air: AirTable,
    drag: DragTable,
  ) {
    this.mu = planet.gravitationalParameter;
    this.omega = planet.rotationRate;
    this.e2 = planet.eccentricitySquared;
    this.polarRadius = planet.equatorialRadius * Math.sqrt(1 - this.e2);
    this.j2Scale = 1.5 * planet.secondZonalHarmonic * planet.equatorialRadius ** 2;
    this.machs = Float64Array.from(drag, ([mach]) => mach);
    this.coefficients = Float64Array.from(drag, ([, coefficient]) => coefficient);
  }

  /** Takes over what a phase burns. */
  enter(phase: Phase): void {
    this.fixedThrust = phase.fixedThrust;
    this.fixedFlow = phase.fixedFlow;
    this.mainThrust = phase.mainThrust;
    this.mainFlow = phase.mainFlow;
    this.exitArea = phase.exitArea;
    this.area = phase.area;
    this.accelerationLimit = phase.accelerationLimit;
  }

  private dragCoefficient(mach: number): number {
    const { machs, coefficients } = this;
    const last = machs.length - 1;
    if (last === 0 || mach <= (machs[0] as number)) return coefficients[0] as number;
    for (let k = 1; k <= last; k++) {
      const high = machs[k] as number;
      if (mach > high) continue;
      const low = machs[k - 1] as number;
      const share = (mach - low) / (high - low);
      return (1 - share) * (coefficients[k - 1] as number) + share * (coefficients[k] as number);
    }
    return coefficients[last] as number;
  }

  /** d/dt of a state; the lines of the account follow it where they are wanted. */
  rates(time: number, state: Float64Array, out: Float64Array): void {
    const x = state[0] as number;
    const y = state[1] as number;
    const z = state[2] as number;
    const vx = state[3] as number;
    const vy = state[4] as number;
    const vz = state[5] as number;
    const m = state[MASS] as number;
    const { omega, e2, air } = this;

    const r2 = x * x + y * y + z * z;
    const r = Math.sqrt(r2);
    const s2 = (z * z) / r2;
    const central = -this.mu / (r2 * r);
    const oblate = this.j2Scale / r2;
    const equatorial = central * (1 + oblate * (1 - 5 * s2));
    const gx = equatorial * x;
    const gy = equatorial * y;
    const gz = central * (1 + oblate * (3 - 5 * s2)) * z;

    // Beyond the ellipsoid's radius b/√(1 − e² cos²φ′), less what the normal leans from it: to 2e-7 of the height.
    const surface = this.polarRadius / Math.sqrt(1 - e2 * (1 - s2));
    const height = (r - surface) * (1 - 0.5 * e2 * e2 * s2 * (1 - s2));
    air.look(height);
    const wx = vx + omega * y;
    const wy = vy - omega * x;
    const w2 = wx * wx + wy * wy + vz * vz;
    const w = Math.sqrt(w2);
    const pressure = 0.5 * air.density * w2;
    const cd =
      this.machs.length === 1 ? (this.coefficients[0] as number) : this.dragCoefficient(w / air.soundSpeed);
    const drag = pressure * cd * this.area;
    this.height = height;
    this.airSpeed = w;
    this.dynamicPressure = pressure;
    this.dragForce = drag;

    let ux = 0;
    let uy = 0;
    let uz = 0;
    let flow = 0;
    let vacuum = 0;
    let back = 0;
    if (this.throttle !== COASTING) {
      const { steering } = this;
      if (steering.mode === GRAVITY_TURN && w > 0) {
        ux = wx / w;
        uy = wy / w;
        uz = vz / w;
      } else {
        steering.aim(time, x, y, z, r, omega);
        ux = steering.direction[0] as number;
        uy = steering.direction[1] as number;
        uz = steering.direction[2] as number;
      }
      back = air.pressure * this.exitArea;
      let share = 1;
      if (this.dynamicPressureLimit < Infinity) {
        this.holdingThrottle = this.throttleHolding(gx, gy, gz, x, y, z, r, vx, vy, vz, m, ux, uy, uz, back);
        if (this.throttle === PRESSURE_HELD) share = this.holdingThrottle;
      }
      if (this.throttle === ACCELERATION_HELD) {
        share = (m * this.accelerationLimit - this.fixedThrust) / this.mainThrust;
      }
      if (share !== 1) share = Math.min(1, Math.max(0, share));
      vacuum = this.fixedThrust + share * this.mainThrust;
      flow = this.fixedFlow + share * this.mainFlow;
    }
    const thrust = vacuum - back;
    this.thrust = thrust;

    const push = thrust / m;
    const brake = w > 0 ? drag / (m * w) : 0;
    out[0] = vx;
    out[1] = vy;
    out[2] = vz;
    out[3] = gx + push * ux - brake * wx;
    out[4] = gy + push * uy - brake * wy;
    out[5] = gz + push * uz - brake * vz;
    out[MASS] = -flow;
    if (!this.accounting) return;

    // Along the air-relative velocity; at rest, along the thrust, which is where the vehicle is about to go.
    const tx = w > 0 ? wx / w : ux;
    const ty = w > 0 ? wy / w : uy;
    const tz = w > 0 ? vz / w : uz;
    const [fx, fy, fz] = [push * ux - brake * wx, push * uy - brake * wy, push * uz - brake * vz];
    this.felt = Math.sqrt(fx * fx + fy * fy + fz * fz);
    out[IDEAL] = vacuum / m;
    out[GRAVITY] = -(tx * gx + ty * gy + tz * gz);
    out[DRAG] = drag / m;
    out[STEERING] = push * (1 - (tx * ux + ty * uy + tz * uz));
    out[BACK_PRESSURE] = back / m;
    out[CENTRIFUGAL] = omega * omega * (tx * x + ty * y);
  }

  /**
   * The throttle at which ½ρw² stands still: ρ′ḣw + 2ρẇ = 0 solved for the thrust. The pressure is drawn to the limit
   * with a time constant longer than any step, so that what the steps leave cannot walk away.
   */
  private throttleHolding(
    gx: number,
    gy: number,
    gz: number,
    x: number,
    y: number,
    z: number,
    r: number,
    vx: number,
    vy: number,
    vz: number,
    m: number,
    ux: number,
    uy: number,
    uz: number,
    back: number,
  ): number {
    const { omega, air } = this;
    const w = this.airSpeed;
    if (!(air.density > 0) || w < 1) return Infinity;
    const tx = (vx + omega * y) / w;
    const ty = (vy - omega * x) / w;
    const tz = vz / w;
    const climb = (x * vx + y * vy + z * vz) / r;
    const drawn =
      this.throttle === PRESSURE_HELD ? (this.dynamicPressureLimit - this.dynamicPressure) / DRAWN_IN : 0;
    const wanted = (drawn - 0.5 * air.densitySlope * climb * w * w) / (air.density * w);
    const centrifugal = omega * omega * (tx * x + ty * y);
    const rest = tx * gx + ty * gy + tz * gz + centrifugal - this.dragForce / m;
    const thrust = (m * (wanted - rest)) / (tx * ux + ty * uy + tz * uz);
    return (thrust + back - this.fixedThrust) / this.mainThrust;
  }

  /** Reads what a state gives without moving: pressure, height, throttle. */
  probe(): void {
    this.rates(this.time, this.state, this.k1);
  }

  /** Air-relative speed in m/s. */
  relativeSpeed(): number {
    const { state, omega } = this;
    const wx = (state[3] as number) + omega * (state[1] as number);
    const wy = (state[4] as number) - omega * (state[0] as number);
    return Math.sqrt(wx * wx + wy * wy + (state[5] as number) ** 2);
  }

  /** Angle of the air-relative velocity over the geocentric horizontal, rad; the vertical at rest. */
  pathNow(): number {
    const { state } = this;
    const [x, y, z] = [state[0] as number, state[1] as number, state[2] as number];
    // The Earth's turning carries across the radius: r · w = r · v.
    const climb = x * (state[3] as number) + y * (state[4] as number) + z * (state[5] as number);
    const moved = Math.sqrt(x * x + y * y + z * z) * this.relativeSpeed();
    return moved > 0 ? Math.asin(Math.min(1, Math.max(-1, climb / moved))) : Math.PI / 2;
  }

  /** Heading of the air-relative velocity, clockwise from north, rad in (−π, π]; the vertical is the ellipsoid's. */
  headingNow(): number {
    const { state, omega } = this;
    const [x, y] = [state[0] as number, state[1] as number];
    const wx = (state[3] as number) + omega * y;
    const wy = (state[4] as number) - omega * x;
    const p = Math.sqrt(x * x + y * y);
    const scaled = (state[2] as number) / (1 - this.e2);
    const east = (x * wy - y * wx) / p;
    const outward = (x * wx + y * wy) / p;
    const north = (p * (state[5] as number) - scaled * outward) / Math.sqrt(p * p + scaled * scaled);
    return Math.atan2(east, north);
  }

  /** One classical Runge–Kutta step of `h` seconds from the state it stands in. @see ascentReferences.rungeKutta */
  step(h: number): void {
    const { state, trial, k1, k2, k3, k4, time } = this;
    const n = this.accounting ? ACCOUNTED : STATE;
    const half = h / 2;
    this.rates(time, state, k1);
    for (let i = 0; i < n; i++) trial[i] = (state[i] as number) + half * (k1[i] as number);
    this.rates(time + half, trial, k2);
    for (let i = 0; i < n; i++) trial[i] = (state[i] as number) + half * (k2[i] as number);
    this.rates(time + half, trial, k3);
    for (let i = 0; i < n; i++) trial[i] = (state[i] as number) + h * (k3[i] as number);
    this.rates(time + h, trial, k4);
    const sixth = h / 6;
    for (let i = 0; i < n; i++) {
      const slope = (k1[i] as number) + 2 * ((k2[i] as number) + (k3[i] as number)) + (k4[i] as number);
      state[i] = (state[i] as number) + sixth * slope;
    }
    this.time = time + h;
  }
}

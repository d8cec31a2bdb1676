/*
 * One ascent integrated a second time, straight from the equations of motion, with plain objects and arrays: a vector is
 * an array made anew by every operation, the air is worked out from its formulas. A test holds core against it, the
 * bench measures core beside it. Of core it knows the standard atmosphere and the shapes of its inputs.
 */
import { standardAir } from '#core/flight/ascent/atmosphere.ts';
import type { Phase, Stack } from '#core/flight/ascent/stack.ts';

const [A, F, MU, OMEGA, J2] = [6_378_137, 1 / 298.257223563, 3.986004418e14, 7.292115e-5, 1.082629821e-3];
const E2 = F * (2 - F);

type Vector = readonly [number, number, number];
const add = (a: Vector, b: Vector): Vector => [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
const times = (k: number, a: Vector): Vector => [k * a[0], k * a[1], k * a[2]];
const dot = (a: Vector, b: Vector) => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
const cross = (a: Vector, b: Vector): Vector => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
const size = (a: Vector) => Math.sqrt(dot(a, a));
const unit = (a: Vector) => times(1 / size(a), a);
const turned = (a: Vector, angle: number): Vector => [
  a[0] * Math.cos(angle) - a[1] * Math.sin(angle),
  a[0] * Math.sin(angle) + a[1] * Math.cos(angle),
  a[2],
];

export interface PlainState {
  readonly time: number;
  readonly place: Vector;
  readonly velocity: Vector;
  readonly mass: number;
}

/** What an ascent of section 8 is steered by. */
export interface PlainSteering {
  readonly latitude: number;
  readonly azimuth: number;
  readonly tilt: number;
  readonly firstTangent: number;
  readonly lastTangent: number;
  readonly tangentDuration: number;
  readonly yaw: number;
  readonly payload: number;
  readonly endMass: number;
}

/** Altitude over the ellipsoid by iterating the latitude. */
function altitudeOf([x, y, z]: Vector): number {
  const p = Math.hypot(x, y);
  let latitude = Math.atan2(z, p * (1 - E2));
  for (let k = 0; k < 4; k++) {
    const normal = A / Math.sqrt(1 - E2 * Math.sin(latitude) ** 2);
    latitude = Math.atan2(z + E2 * normal * Math.sin(latitude), p);
  }
  const normal = A / Math.sqrt(1 - E2 * Math.sin(latitude) ** 2);
  return p * Math.cos(latitude) + z * Math.sin(latitude) - (A * A) / normal;
}

function gravityAt(place: Vector): Vector {
  const r = size(place);
  const s2 = (place[2] / r) ** 2;
  const k = -MU / r ** 3;
  const j = 1.5 * J2 * (A / r) ** 2;
  return [
    k * place[0] * (1 + j * (1 - 5 * s2)),
    k * place[1] * (1 + j * (1 - 5 * s2)),
    k * place[2] * (1 + j * (3 - 5 * s2)),
  ];
}

interface Rates {
  readonly place: Vector;
  readonly velocity: Vector;
  readonly mass: number;
}

/** Direction of thrust by time and state. */
type Aim = (state: PlainState, airVelocity: Vector) => Vector;

function ratesOf(state: PlainState, phase: Phase, stack: Stack, aim: Aim, limited: boolean): Rates {
  const { place, velocity, mass } = state;
  const airVelocity = add(velocity, [OMEGA * place[1], -OMEGA * place[0], 0]);
  const air = standardAir(altitudeOf(place));
  const w = size(airVelocity);
  const coefficient = stack.drag[0]![1];
  const drag = times((-0.5 * air.density * coefficient * phase.area * w) / mass, airVelocity);
  const share = limited ? (mass * phase.accelerationLimit - phase.fixedThrust) / phase.mainThrust : 1;
  const thrust = phase.fixedThrust + share * phase.mainThrust - air.pressure * phase.exitArea;
  const push = times(thrust / mass, aim(state, airVelocity));
  return {
    place: velocity,
    velocity: add(add(gravityAt(place), push), drag),
    mass: -(phase.fixedFlow + share * phase.mainFlow),
  };
}

const after = (state: PlainState, rates: Rates, h: number): PlainState => ({
  time: state.time + h,
  place: add(state.place, times(h, rates.place)),
  velocity: add(state.velocity, times(h, rates.velocity)),
  mass: state.mass + h * rates.mass,
});

function stepped(state: PlainState, h: number, rates: (state: PlainState) => Rates): PlainState {
  const k1 = rates(state);
  const k2 = rates(after(state, k1, h / 2));
  const k3 = rates(after(state, k2, h / 2));
  const k4 = rates(after(state, k3, h));
  const mean = (of: (rates: Rates) => Vector): Vector =>
    times(1 / 6, add(add(of(k1), times(2, add(of(k2), of(k3)))), of(k4)));
  return after(
    state,
    {
      place: mean((k) => k.place),
      velocity: mean((k) => k.velocity),
      mass: (k1.mass + 2 * (k2.mass + k3.mass) + k4.mass) / 6,
    },
    h,
  );
}

function across(
  state: PlainState,
  seconds: number,
  longest: number,
  rates: (state: PlainState) => Rates,
): PlainState {
  const n = Math.max(1, Math.ceil(seconds / longest - 1e-9));
  let now = state;
  for (let k = 0; k < n; k++) now = stepped(now, seconds / n, rates);
  return now;
}

/** The directions of thrust of section 8: rise, kick, gravity turn. */
function ascending(stack: Stack, steering: PlainSteering): (time: number) => Aim {
  const [s, c] = [Math.sin(steering.latitude), Math.cos(steering.latitude)];
  const up: Vector = [c, 0, s];
  const along = add(
    times(Math.sin(steering.azimuth), [0, 1, 0]),
    times(Math.cos(steering.azimuth), [-s, 0, c]),
  );
  const kickEnd = stack.verticalRise + stack.kick;
  return (from) => {
    if (from < stack.verticalRise - 1e-8) return ({ time }) => turned(up, OMEGA * time);
    if (from >= kickEnd - 1e-8) return (_, airVelocity) => unit(airVelocity);
    return ({ time }) => {
      const tilt = (steering.tilt * (time - stack.verticalRise)) / stack.kick;
      return turned(add(times(Math.cos(tilt), up), times(Math.sin(tilt), along)), OMEGA * time);
    };
  };
}

function tangent(start: PlainState, steering: PlainSteering): Aim {
  const vertical = unit(start.place);
  const normal = cross(start.place, start.velocity);
  const level = cross(normal, vertical);
  const plane = add(times(Math.cos(steering.yaw), normal), times(-Math.sin(steering.yaw), level));
  const slope = (steering.firstTangent - steering.lastTangent) / steering.tangentDuration;
  return ({ time, place }) => {
    const value = steering.firstTangent - slope * (time - start.time);
    const cos = 1 / Math.sqrt(1 + value * value);
    return add(times(cos, unit(cross(plane, place))), times(value * cos, unit(place)));
  };
}

/** A phase from its start to its end, its axial limit met at the moment it starts to bind. */
function flown(
  state: PlainState,
  phase: Phase,
  stack: Stack,
  endMass: number,
  longest: number,
  aim: Aim,
): PlainState {
  const flow = phase.fixedFlow + phase.mainFlow;
  const limit = (phase.fixedThrust + phase.mainThrust) / phase.accelerationLimit;
  const full = (state.mass - Math.max(endMass, limit)) / flow;
  const step = Math.min(longest, (0.12 * Math.max(endMass, limit)) / flow);
  const free = across(state, full, step, (now) => ratesOf(now, phase, stack, aim, false));
  if (limit <= endMass) return free;
  const exhaust = phase.mainThrust / phase.mainFlow;
  const held = (exhaust / phase.accelerationLimit) * Math.log(limit / endMass);
  const shorter = Math.min(longest, (0.12 * free.mass * Math.exp((-flow * held) / free.mass)) / flow);
  return across(free, held, shorter, (now) => ratesOf(now, phase, stack, aim, true));
}

/**
 * An ascent from lift-off to its end mass, in the steps that core makes: 2 s in rise and kick, 1 s early in the gravity turn, then
 * 4 s, 16 s above the air. The limit of dynamic pressure is not looked at.
 */
export function plainAscent(stack: Stack, steering: PlainSteering): PlainState {
  const normal = A / Math.sqrt(1 - E2 * Math.sin(steering.latitude) ** 2);
  const place: Vector = [
    normal * Math.cos(steering.latitude),
    0,
    normal * (1 - E2) * Math.sin(steering.latitude),
  ];
  let state: PlainState = {
    time: 0,
    place,
    velocity: [0, OMEGA * place[0], 0],
    mass: stack.liftOffMass + stack.fairingMass + steering.payload,
  };
  const aims = ascending(stack, steering);
  let fairing = stack.fairingMass;
  let upper: Aim | undefined;
  stack.phases.forEach((phase, k) => {
    const last = k === stack.phases.length - 1;
    const endMass = last ? steering.endMass : phase.endMass + steering.payload + fairing;
    if (phase.stage > 0) {
      upper ??= tangent(state, steering);
      state = flown(state, phase, stack, endMass, 16, upper);
    } else {
      const kicked = stack.verticalRise + stack.kick;
      for (const [boundary, step] of [
        [stack.verticalRise, 2],
        [kicked, 2],
        [kicked + 40, 1],
      ] as const) {
        const aim = aims(state.time);
        const seconds = boundary - state.time;
        if (seconds > 1e-8) {
          state = across(state, seconds, step, (now) => ratesOf(now, phase, stack, aim, false));
        }
      }
      state = flown(state, phase, stack, endMass, 4, aims(state.time));
    }
    const gone = last ? 0 : phase.dropped + (phase.dropsFairing ? fairing : 0);
    if (phase.dropsFairing) fairing = 0;
    state = { ...state, mass: state.mass - gone };
  });
  return state;
}

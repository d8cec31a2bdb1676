import type { Flyer } from './flyer.ts';
import { MASS } from './flyer.ts';
import { ACCELERATION_HELD, COASTING, GRAVITY_TURN, KICK, PRESSURE_HELD } from './modes.ts';
import type { Phase, Stack } from './stack.ts';

/** Longest steps in seconds: in rise and kick, early in the gravity turn, later in the air, above it. */
export interface Steps {
  readonly rise: number;
  readonly turn: number;
  readonly air: number;
  readonly space: number;
  /** Steps in one stretch, more than any ascent has: past them it is given up. */
  readonly most: number;
}

export const STEPS: Steps = { rise: 2, turn: 1, air: 4, space: 16, most: 600 };

/** What rounding leaves of a phase, in seconds. */
export const INSTANT = 1e-8;
/** Seconds for which the gravity turn of a slow vehicle is quick: it turns by g cos γ / v. */
const EARLY_TURN = 40;
/** A step burns no more than this share of what is left aboard: acceleration grows as the mass goes. */
const MOST_BURNT = 0.12;
/** And none is made shorter than this for it, s. */
const SHORTEST = 0.5;
/** Heights below which air still asks for the shorter steps. */
const THIN_AIR = 45_000;

/** When the gravity turn slows down, in seconds after lift-off. */
export const turnSettles = ({ verticalRise, kick }: Stack): number => verticalRise + kick + EARLY_TURN;

/** The longest step by where the vehicle is and how it is steered. */
export function stepAt(flyer: Flyer, stack: Stack, steps: Steps): number {
  // The throttle that holds a pressure jumps where the air's layers meet: short steps keep the pressure near.
  if (flyer.throttle === PRESSURE_HELD) return steps.rise / 4;
  if (flyer.throttle !== COASTING) {
    if (flyer.steering.mode <= KICK) return steps.rise;
    const early = flyer.time < turnSettles(stack) - INSTANT;
    if (flyer.steering.mode === GRAVITY_TURN && early) return steps.turn;
  }
  return flyer.height < THIN_AIR ? steps.air : steps.space;
}

/** The longest step of a powered stretch of some seconds: by `stepAt`, and by how much of its mass it burns. */
export function poweredStep(
  flyer: Flyer,
  stack: Stack,
  steps: Steps,
  { fixedFlow, mainFlow }: Phase,
  seconds: number,
): number {
  const m = flyer.state[MASS] as number;
  const flow = fixedFlow + mainFlow;
  const longest = stepAt(flyer, stack, steps);
  if (flow === 0) return longest;
  const held = flyer.throttle === ACCELERATION_HELD;
  const least = held ? m * Math.exp((-flow * seconds) / m) : m - flow * seconds;
  return Math.min(longest, Math.max(SHORTEST, (MOST_BURNT * least) / flow));
}

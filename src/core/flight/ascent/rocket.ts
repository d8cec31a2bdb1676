import type { Phase, Stack } from './stack.ts';

/** Ideal Δv of a whole stack with a payload, vacuum specific impulses, in m/s; NaN where a mass is not above zero. */
export function stackDeltaV(stack: Stack, payload: number): number {
  let sum = 0;
  let mass = stack.liftOffMass + stack.fairingMass + payload;
  let fairing = stack.fairingMass;
  for (const phase of stack.phases) {
    const exhaust = (phase.fixedThrust + phase.mainThrust) / (phase.fixedFlow + phase.mainFlow);
    const end = phase.endMass + payload + fairing;
    if (!(end > 0)) return NaN;
    sum += exhaust * Math.log(mass / end);
    if (phase.dropsFairing) fairing = 0;
    mass = phase.endMass - phase.dropped + payload + fairing;
  }
  return sum;
}

const HALVINGS = 50;

/** A payload whose ideal Δv is about the one given, for a search to start from; 0 or more. */
export function roughPayload(stack: Stack, deltaV: number): number {
  let [low, high] = [0, stack.liftOffMass];
  for (let k = 0; k < HALVINGS; k++) {
    const middle = (low + high) / 2;
    if (stackDeltaV(stack, middle) > deltaV) low = middle;
    else high = middle;
  }
  return low;
}

/** Ideal Δv of the stages above the first with no payload: the most that can be left to burn after injection. */
export function upperDeltaV(stack: Stack): number {
  const first = stack.phases.findIndex(({ stage }) => stage > 0);
  const before = stack.phases[first - 1] as Phase;
  const fairing = stack.phases.slice(0, first).some(({ dropsFairing }) => dropsFairing)
    ? 0
    : stack.fairingMass;
  const upper: Stack = {
    ...stack,
    phases: stack.phases.slice(first),
    liftOffMass: before.endMass - before.dropped,
    fairingMass: fairing,
  };
  return stackDeltaV(upper, 0);
}

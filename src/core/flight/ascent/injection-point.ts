import type { Phase, Stack } from './stack.ts';

/** Where in the burns a flight ends: the phase, and the mass at its end with payload and the whole fairing counted. */
export interface InjectionPoint {
  phase: number;
  endMass: number;
}

/** Mass at the start of a phase, payload and fairing apart. */
function fullMass({ phases, liftOffMass }: Stack, k: number): number {
  const before = phases[k - 1];
  return before === undefined ? liftOffMass : before.endMass - before.dropped;
}

/** Fairing aboard while a phase burns, as planned: gone with a stage before it, or by heating long since. */
function fairingDuring({ phases, fairingMass, fairingHeating }: Stack, k: number): number {
  if (fairingHeating > 0) return 0;
  for (let j = 0; j < k; j++) if ((phases[j] as Phase).dropsFairing) return 0;
  return fairingMass;
}

/**
 * The point from which the propellant left gives a Δv: burnt by the last stage at its vacuum specific impulse, and by
 * those before it where it alone does not do.
 * @param deltaV what is still to be burnt after injection, m/s
 * @param point filled with the answer
 * @returns false where the stages above the first do not hold so much, or the masses make no sense
 */
export function injectionPoint(
  stack: Stack,
  payload: number,
  deltaV: number,
  point: InjectionPoint,
): boolean {
  let left = deltaV;
  for (let k = stack.phases.length - 1; k >= 0; k--) {
    const phase = stack.phases[k] as Phase;
    if (phase.stage === 0) return false;
    const fairing = fairingDuring(stack, k);
    const empty = phase.endMass + payload + fairing;
    const full = fullMass(stack, k) + payload + fairing;
    if (!(empty > 0)) return false;
    const exhaust = phase.mainThrust / phase.mainFlow;
    const most = exhaust * Math.log(full / empty);
    if (left < most) {
      point.phase = k;
      point.endMass = empty * Math.exp(left / exhaust) + stack.fairingMass - fairing;
      return true;
    }
    left -= most;
  }
  return false;
}

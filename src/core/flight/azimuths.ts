import { radians } from '../units.ts';
import type { Radians } from '../units.ts';

export const TURN = 2 * Math.PI;

/** 1e-9° in radians: the slack of sectors, of edges that are one, and of the 60° rule. */
export const ANGLE_SLACK = (1e-9 * Math.PI) / 180;

/** An angle brought into 0…2π, 2π itself excluded. */
export function wrap(angle: number): Radians {
  const rest = angle % TURN;
  const wrapped = rest < 0 ? rest + TURN : rest;
  // A tiny negative angle plus a turn rounds to the turn.
  return radians(wrapped >= TURN ? 0 : wrapped);
}

/** A launch azimuth is northerly where cos β ≥ −1e-9. */
export const isNortherly = (cosAzimuth: number): boolean => cosAzimuth >= -1e-9;

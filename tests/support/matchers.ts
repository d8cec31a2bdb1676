import { expect } from 'vitest';
import type { Tolerance } from './reference.ts';

/** The widest distance a tolerance allows; a number is an absolute one. */
function widthOf(tolerance: Tolerance | number, expected: number): number {
  if (typeof tolerance === 'number') return tolerance;
  return tolerance.kind === 'rel' ? tolerance.value * Math.abs(expected) : tolerance.value;
}

expect.extend({
  toBeWithin(received: number, expected: number, tolerance: Tolerance | number) {
    const width = widthOf(tolerance, expected);
    const distance = Math.abs(received - expected);
    // Half a unit of the last place is itself rounded; a thousandth of the width forgives that and no more.
    const pass = distance <= width * 1.001;
    return {
      pass,
      message: () =>
        `${received} lies ${distance} from ${expected}; ${pass ? 'outside' : 'within'} ${width} was asked for`,
    };
  },
});

declare module 'vitest' {
  // The type parameter is vitest's own: an interface merges only with one of the same name.
  interface Matchers<T> {
    toBeWithin(
      expected: number,
      tolerance: Tolerance | number,
    ): T extends Promise<unknown> ? Promise<void> : void;
  }
}

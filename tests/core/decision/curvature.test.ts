import { expect, test } from 'vitest';
import { curvatureThrough } from '#core/decision/curvature.ts';
import { shareOfExponential } from '#core/decision/exponential.ts';

// The inverse, worked by hand: v(½) = 1/(1 + e^(−c/2)), so a middle of e/(1 + e) belongs to c = 2. [derived]
test('gives the curvature whose curve passes through the middle', () => {
  expect(curvatureThrough(Math.E / (1 + Math.E))).toBeCloseTo(2, 12);
  expect(curvatureThrough(1 / (1 + Math.E))).toBeCloseTo(-2, 12);
  expect(curvatureThrough(0.5)).toBe(0);
  for (const middle of [0.0001, 0.08, 0.3, 0.62, 0.97, 0.9999])
    expect(shareOfExponential(0.5, curvatureThrough(middle))).toBeCloseTo(middle, 12);
});

test.each([0, 1, -0.2, 1.3, NaN])('refuses %f', (middle) => {
  expect(() => curvatureThrough(middle)).toThrow(RangeError);
});

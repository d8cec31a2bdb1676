import { describe, expect, test } from 'vitest';
import { Maximiser } from '#core/flight/ascent/maximise.ts';
import type { Shooting } from '#core/flight/ascent/shooting.ts';

/** A problem in closed form, its derivatives by forward differences as a flight's are. */
function problem(
  n: number,
  m: number,
  objective: number,
  conditions: (x: Float64Array) => number[],
  bounds: readonly [number, number] = [-1e3, 1e3],
): Shooting {
  const evaluate = (x: Float64Array, out: Float64Array): boolean => {
    out.set(conditions(x));
    return out.every(Number.isFinite);
  };
  const beside = new Float64Array(m);
  return {
    scales: new Float64Array(n).fill(1),
    tolerances: new Float64Array(m).fill(1e-5),
    leanings: new Float64Array(n).fill(1),
    lowest: new Float64Array(n).fill(bounds[0]),
    highest: new Float64Array(n).fill(bounds[1]),
    objective,
    evaluate,
    differentiate: (x, at, jacobian) => {
      for (let k = 0; k < n; k++) {
        const shifted = x.slice();
        shifted[k] = x[k]! + 1e-7;
        evaluate(shifted, beside);
        for (let i = 0; i < m; i++) jacobian[i * n + k] = (beside[i]! - at[i]!) / 1e-7;
      }
      return true;
    },
  };
}

const limits = { iterations: 60, gain: 1e-8, stride: 4 };

function solve(of: Shooting, start: readonly number[]) {
  const maximiser = new Maximiser(of);
  maximiser.variables.set(start);
  const search = maximiser.run(limits);
  return { ...search, x: [...maximiser.variables] };
}

describe('the largest variable under conditions', () => {
  test('on a sphere cut by a plane is where Lagrange says', () => {
    // [derived] Largest z with x² + y² + z² = 1 and x + y + z = 0: z = √(2/3), x = y = −√(1/6).
    const found = solve(
      problem(3, 2, 2, ([x, y, z]) => [x! * x! + y! * y! + z! * z! - 1, x! + y! + z!]),
      [0.6, -0.9, 0.2],
    );
    expect(found.outcome).toBe('converged');
    expect(found.x[2]).toBeWithin(Math.sqrt(2 / 3), 1e-5);
    expect(found.x[0]).toBeWithin(-Math.sqrt(1 / 6), 1e-3);
  });

  test('with three left free is found in few steps', () => {
    // [derived] p = 10 − (a − 1)² − 3 (b + 2)² − (a − 1)(b + 2) − (c − 0.5)⁴ − (c − 0.5)² is largest, 10, at (1, −2, 0.5).
    const found = solve(
      problem(4, 1, 0, ([p, a, b, c]) => [
        p! - 10 + (a! - 1) ** 2 + 3 * (b! + 2) ** 2 + (a! - 1) * (b! + 2) + (c! - 0.5) ** 4 + (c! - 0.5) ** 2,
      ]),
      [0, 0, 0, 0],
    );
    expect(found.outcome).toBe('converged');
    expect(found.x[0]).toBeWithin(10, 2e-5);
    [1, -2, 0.5].forEach((at, k) => expect(found.x[k + 1]).toBeWithin(at, 5e-3));
    expect(found.iterations).toBeLessThan(30);
  });

  test('with as many conditions as variables is a root', () => {
    // [derived] x² = 2, x y = 1.
    const found = solve(
      problem(2, 2, 0, ([x, y]) => [x! * x! - 2, x! * y! - 1]),
      [3, 3],
    );
    expect(found.outcome).toBe('converged');
    expect(found.x[0]).toBeWithin(Math.SQRT2, 1e-5);
    expect(found.x[1]).toBeWithin(Math.SQRT1_2, 1e-5);
  });

  test('stops at a bound that the slope points out of', () => {
    // [derived] p = q with q ≤ 2.
    const found = solve(
      problem(2, 1, 0, ([p, q]) => [p! - q!], [-2, 2]),
      [0, 0],
    );
    expect(found.x[0]).toBeWithin(2, 1e-4);
  });

  test.each([
    ['contradict each other', ([x, y]: Float64Array) => [x! + y!, x! + y! - 1]],
    ['cannot be met', ([x, y]: Float64Array) => [x! * x! + 1 + 0 * y!, y!]],
  ])('is none where the conditions %s', (_, conditions) => {
    const found = solve(problem(2, 2, 0, conditions), [1, 1]);
    expect(found.outcome).not.toBe('converged');
    expect(found.residual).toBeGreaterThan(1);
    expect(found.iterations).toBeLessThanOrEqual(limits.iterations);
  });

  test('is none where the start cannot be flown', () => {
    expect(
      solve(
        problem(1, 1, 0, () => [NaN]),
        [0],
      ).outcome,
    ).toBe('cannot-be-flown');
  });
});

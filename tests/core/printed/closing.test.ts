import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { closedSums, closes, closingDecimals, weightedDecimals } from '#core/printed/closing.ts';
import { formatNumber } from '#contract/format.ts';
import { decimalsNeeded } from '#core/printed/figure.ts';

/** Reads the printed text back and adds in whole steps, as a person with pencil and paper does. */
const read = (text: string): bigint => BigInt(text.replace('−', '-').replaceAll(',', '').replace('.', ''));

const part = fc.double({ min: -20_000, max: 20_000, noNaN: true });
const sums = fc.array(
  fc
    .array(part, { minLength: 1, maxLength: 8 })
    .map((parts) => ({ parts, total: parts.reduce((a, b) => a + b, 0) })),
  { minLength: 1, maxLength: 40 },
);

describe('decimals of a column', () => {
  test('decimals needed are the fewest that lose nothing, up to the most', () => {
    expect(decimalsNeeded([])).toBe(0);
    expect(decimalsNeeded([12.5, 3])).toBe(1);
    expect(decimalsNeeded([0.125, 3])).toBe(3);
    expect(decimalsNeeded([1 / 3])).toBe(3);
  });
});

describe('sums that close', () => {
  test('plain rounding is kept where it closes', () => {
    const sum = { parts: [1.2, 2.3], total: 3.5 };
    expect(closedSums([sum], 0)).toEqual({
      decimals: 1,
      adjusted: false,
      sums: [{ parts: [1.2, 2.3], total: 3.5 }],
    });
  });

  test('one more digit is printed on all before any part gives way', () => {
    expect(closes({ parts: [0.5484, 0.1948], total: 0.7432 }, 3)).toBe(true);
    expect(closingDecimals([{ parts: [0.6874, 0.0544], total: 0.7418 }], 3, 6)).toBe(4);
  });

  test('parts give way by largest remainders: thirds of ten are 3.3, 3.3 and 3.4', () => {
    // [derived]: 10/3 three times over; the remainders tie, so the first moves.
    expect(closedSums([{ parts: [10 / 3, 10 / 3, 10 / 3], total: 10 }], 0, 1)).toEqual({
      decimals: 1,
      adjusted: true,
      sums: [{ parts: [3.4, 3.3, 3.3], total: 10 }],
    });
  });

  test('a total that is not the sum of its parts is refused', () => {
    expect(() => closedSums([{ parts: [1, 2], total: 4 }], 0)).toThrow(RangeError);
  });

  test('whatever the figures, the printed digits add up and no part is a step off', () => {
    fc.assert(
      fc.property(sums, fc.integer({ min: 0, max: 3 }), (given, least) => {
        const closed = closedSums(given, least);
        const text = (value: number) => formatNumber(value, closed.decimals);
        closed.sums.forEach((sum, row) => {
          const added = sum.parts.reduce((so, p) => so + read(text(p)), 0n);
          expect(added).toBe(read(text(sum.total)));
          sum.parts.forEach((p, at) => {
            const original = given[row]?.parts[at] ?? NaN;
            expect(Math.abs(p - original)).toBeLessThan(10 ** -closed.decimals + 1e-9);
            if (Number(original.toFixed(closed.decimals)) === original) expect(p).toBeCloseTo(original, 9);
          });
        });
      }),
      { seed: 20310401 },
    );
  });

  test('a weighted sum closes at its own, coarser decimals', () => {
    // [derived]: 3 × 33.4 kg is 0.1002 t, printed 0.10; from 33 kg a reader comes to 0.099, printed 0.10 as well.
    expect(weightedDecimals([{ parts: [33.4], factors: [0.003], total: 0.1002 }], 2, 0, 2)).toBe(0);
    // [derived]: 300 × 33.4 kg is 10.02 t, printed 10.0; from 33 kg a reader comes to 9.9, so 33.4 is printed.
    expect(weightedDecimals([{ parts: [33.4], factors: [0.3], total: 10.02 }], 1, 0, 2)).toBe(1);
  });
});

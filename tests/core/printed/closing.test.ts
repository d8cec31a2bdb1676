import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { closedSums, closes, closingDecimals } from '#core/printed/closing.ts';
import { decimalsNeeded, printedFigure } from '#core/printed/figure.ts';

/** Reads the printed text back and adds in whole steps, as a person with pencil and paper does. */
const read = (text: string, decimals: number): bigint =>
  BigInt(
    text.replace('−', '-').replaceAll(',', '').replace('.', '') + (text === '0' ? '0'.repeat(decimals) : ''),
  );

const part = fc.double({ min: -20_000, max: 20_000, noNaN: true });
const sums = fc.array(
  fc
    .array(part, { minLength: 1, maxLength: 8 })
    .map((parts) => ({ parts, total: parts.reduce((a, b) => a + b, 0) })),
  { minLength: 1, maxLength: 40 },
);

describe('printed figures', () => {
  // [derived] from the written rule: true minus U+2212, comma each three digits, "0" for zero.
  test.each([
    [0, 2, '0'],
    [-0, 0, '0'],
    [1234567.891, 1, '1,234,567.9'],
    [-1234.5, 1, '−1,234.5'],
    [-0.04, 1, '0.0'],
    [999.96, 1, '1,000.0'],
    [12, 0, '12'],
    [123456, 0, '123,456'],
  ])('%d to %d decimals is %s', (value, decimals, text) => {
    expect(printedFigure(value, decimals)).toBe(text);
  });

  test('a figure that is none is refused', () => {
    expect(() => printedFigure(NaN, 1)).toThrow(RangeError);
    expect(() => printedFigure(Infinity, 1)).toThrow(RangeError);
  });

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
        const text = (value: number) => printedFigure(value, closed.decimals);
        closed.sums.forEach((sum, row) => {
          const added = sum.parts.reduce((so, p) => so + read(text(p), closed.decimals), 0n);
          expect(added).toBe(read(text(sum.total), closed.decimals));
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
});

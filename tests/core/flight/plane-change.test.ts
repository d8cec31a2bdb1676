import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { bestSplit, burnOf, costOf, sharedPlaneChange } from '#core/flight/plane-change.ts';
import { fromDegrees } from '#core/units.ts';
import { SEED } from '#tests/support/flights.ts';
import { scan } from '#tests/support/scan.ts';

const speed = fc.double({ min: 500, max: 11_000, noNaN: true });
/** Steps of a burn from nothing at all to kilometres a second: small ones leave kinks close to the ends. */
const step = fc.oneof(
  fc.constant(0),
  fc.double({ min: -6, max: 0, noNaN: true }).map((exponent) => 10 ** exponent),
  fc.double({ min: 0, max: 3000, noNaN: true }),
);

describe('a plane change shared between two burns', () => {
  test('a fine scan, ends and their neighbourhood included, finds no cheaper split', () => {
    fc.assert(
      fc.property(
        speed,
        step,
        speed,
        step,
        fc.double({ min: 0, max: 60, noNaN: true }),
        (v1, d1, v2, d2, deg) => {
          const [first, second] = [burnOf(v1, v1 + d1), burnOf(v2, v2 + d2)];
          const change = fromDegrees(deg);
          const sum = (share: number) => costOf(first, share) + costOf(second, change - share);
          const split = bestSplit(first, second, change);
          expect(split).toBeGreaterThanOrEqual(0);
          expect(split).toBeLessThanOrEqual(change);
          expect(sharedPlaneChange(first, second, change)).toBe(sum(split));
          expect(sum(split)).toBeLessThanOrEqual(scan(sum, 0, change).value + 1e-6);
        },
      ),
      { ...SEED, numRuns: 2000 },
    );
  }, 60_000);

  test('between two equal circles the whole change is made at one end', () => {
    const burn = burnOf(7700, 7700);
    const change = fromDegrees(20);
    expect([0, change]).toContain(bestSplit(burn, burn, change));
    // A sum of two turns of half the angle costs more than one of the whole: the chord is shorter than the arc.
    expect(sharedPlaneChange(burn, burn, change)).toBeWithin(2 * 7700 * Math.sin(change / 2), 1e-9);
  });

  test('no change costs the two burns alone', () => {
    expect(sharedPlaneChange(burnOf(7800, 10_200), burnOf(1600, 3070), 0)).toBeWithin(2400 + 1470, 1e-9);
  });
});

import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { concordance } from '#core/decision/concordance.ts';
import { reference } from '#tests/support/reference.ts';
import { rowsFrom } from './tables.ts';

describe('agreement of rankings', () => {
  test.each(reference('decision-concordance'))('$id', (row) => {
    const agreement = concordance(rowsFrom(row.rankings));
    expect(agreement.kind === 'agreement' ? agreement.w : NaN).toBeWithin(row.expected, row.tolerance);
  });

  test('is undefined where every judge ties everything, or there is one thing alone', () => {
    expect(concordance(rowsFrom('1;1;1|2;2;2'))).toEqual({ kind: 'undefined' });
    expect(concordance(rowsFrom('1|1'))).toEqual({ kind: 'undefined' });
  });

  test('lies in 0 to 1, whoever sits where; what is ranked by the same order is ranked the same', () => {
    const row = fc.array(fc.integer({ min: 1, max: 5 }), { minLength: 5, maxLength: 5 });
    fc.assert(
      fc.property(fc.array(row, { minLength: 2, maxLength: 6 }), (rankings) => {
        const agreement = concordance(rankings);
        expect(concordance([...rankings].reverse())).toEqual(agreement);
        expect(concordance(rankings.map((r) => r.map((x) => 10 * x * x)))).toEqual(agreement);
        if (agreement.kind === 'undefined') return;
        expect(agreement.w).toBeGreaterThanOrEqual(0);
        expect(agreement.w).toBeLessThanOrEqual(1);
      }),
    );
  });

  test('refuses no judge, and judges of different things', () => {
    expect(() => concordance([])).toThrow(RangeError);
    expect(() => concordance([[1, 2], [1]])).toThrow(RangeError);
  });
});

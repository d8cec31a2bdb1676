import fc from 'fast-check';
import { scaleLinear } from 'd3-scale';
import { describe, expect, test } from 'vitest';
import type { Criterion } from '#core/decision/criterion.ts';
import { figureTable } from '#core/decision/figures.ts';
import { spanOf, straightValue } from '#core/decision/value.ts';

const figure = fc.double({ min: -1e6, max: 1e6, noNaN: true });
const open = (direction: Criterion['direction']): Criterion => ({
  direction,
  levels: { kind: 'candidates' },
  limit: null,
});

describe('straight value', () => {
  test('agrees with a clamped linear scale of a general-purpose library', () => {
    fc.assert(
      fc.property(figure, figure, figure, (worst, best, x) => {
        fc.pre(Math.abs(best - worst) > 1e-3);
        const scale = scaleLinear([worst, best], [0, 1]).clamp(true);
        expect(Math.abs(straightValue(x, { kind: 'span', worst, best }) - scale(x))).toBeLessThanOrEqual(
          1e-9,
        );
      }),
    );
  });

  test('stays within 0 to 1 and meets both ends exactly, however wide or narrow the levels', () => {
    const any = fc.double({ noNaN: true, noDefaultInfinity: true });
    fc.assert(
      fc.property(any, any, any, (worst, best, x) => {
        fc.pre(Math.abs(best / 2 - worst / 2) > 1e-300);
        const span = { kind: 'span', worst, best } as const;
        const v = straightValue(x, span);
        expect(v).toBeGreaterThanOrEqual(0);
        expect(v).toBeLessThanOrEqual(1);
        expect(straightValue(worst, span)).toBe(0);
        expect(straightValue(best, span)).toBe(1);
      }),
    );
  });
});

describe('levels', () => {
  test('from the candidates: lowest and highest figure, turned round where less is better', () => {
    const table = figureTable([[4], [null], [9], ['worst'], [6]]);
    expect(spanOf(open('more'), table, 0)).toEqual({ kind: 'span', worst: 4, best: 9 });
    expect(spanOf(open('less'), table, 0)).toEqual({ kind: 'span', worst: 9, best: 4 });
  });

  test('all equal is flat and gives 0 for all; none at all is empty', () => {
    const flat = spanOf(open('more'), figureTable([[7], [7], [null]]), 0);
    expect(flat).toEqual({ kind: 'flat', figure: 7 });
    expect(straightValue(7, flat)).toBe(0);
    expect(spanOf(open('more'), figureTable([[null], ['worst']]), 0)).toEqual({ kind: 'empty' });
  });

  test.each<[string, Criterion]>([
    ['equal', { direction: 'more', levels: { kind: 'fixed', worst: 1, best: 1 }, limit: null }],
    ['against "more"', { direction: 'more', levels: { kind: 'fixed', worst: 2, best: 1 }, limit: null }],
    ['against "less"', { direction: 'less', levels: { kind: 'fixed', worst: 1, best: 2 }, limit: null }],
    ['not finite', { direction: 'more', levels: { kind: 'fixed', worst: 1, best: Infinity }, limit: null }],
    ['a limit not finite', { ...open('more'), limit: { kind: 'at-least', figure: NaN } }],
  ])('refuses fixed levels or limits that make no sense: %s', (_, criterion) => {
    expect(() => spanOf(criterion, figureTable([[1]]), 0)).toThrow(RangeError);
  });
});

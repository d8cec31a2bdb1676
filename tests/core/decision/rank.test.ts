import { describe, expect, test } from 'vitest';
import type { Criterion, Limit } from '#core/decision/criterion.ts';
import { figureTable, type Cell } from '#core/decision/figures.ts';
import { failuresOf } from '#core/decision/listing.ts';
import { prepare } from '#core/decision/prepare.ts';
import { rank, termOf } from '#core/decision/rank.ts';
import { weightsFromPoints } from '#core/decision/weights.ts';

const percent = (limit: Limit | null = null): Criterion => ({
  direction: 'more',
  levels: { kind: 'fixed', worst: 0, best: 100 },
  limit,
});
const weigh = (...points: number[]): Float64Array => {
  const result = weightsFromPoints(points);
  if (result.kind === 'unset') throw new Error('no points');
  return result.weights;
};
const rankRows = (rows: Cell[][], points: number[], criteria = points.map(() => percent())) =>
  rank(prepare(criteria, figureTable(rows)), weigh(...points));

describe('ranks', () => {
  test('ties share a rank and the next ones are skipped: 1, 2, 2, 4', () => {
    const { ranked, ranks, margin } = rankRows([[50], [90], [70], [70]], [1]);
    expect([...ranked]).toEqual([1, 2, 3, 0]);
    expect([...ranks]).toEqual([1, 2, 2, 4]);
    expect(margin).toBeCloseTo(0.2, 12);
  });

  test('values 1e-12 apart tie, values 3e-12 apart do not', () => {
    expect([...rankRows([[50], [50 + 0.5e-10]], [1]).ranks]).toEqual([1, 1]);
    expect([...rankRows([[50], [50 + 3e-10]], [1]).ranks]).toEqual([1, 2]);
  });

  test('two leaders leave no margin, one ranked site has none', () => {
    expect(rankRows([[50], [50]], [1]).margin).toBe(0);
    expect(rankRows([[50]], [1]).margin).toBeNull();
    expect(rankRows([], [1]).ranked).toHaveLength(0);
  });
});

describe('must-meet limits', () => {
  const criteria = [percent({ kind: 'at-least', figure: 60 }), percent({ kind: 'at-most', figure: 40 })];

  test('a site that fails one is set aside with every limit it fails', () => {
    const prepared = prepare(
      criteria,
      figureTable([
        [60, 40],
        [59, 41],
        [70, 40.5],
      ]),
    );
    expect(prepared.failures).toEqual([
      { site: 1, criterion: 0 },
      { site: 1, criterion: 1 },
      { site: 2, criterion: 1 },
    ]);
    expect([0, 1, 2, 3].map((site) => failuresOf(prepared, site))).toEqual([[], [0, 1], [1], []]);
    const { ranked, setAside } = rank(prepared, weigh(1, 1));
    expect([...ranked]).toEqual([0]);
    expect(setAside).toEqual([1, 2]);
  });

  test('a set-aside site still stretches candidate-set levels', () => {
    const open: Criterion = {
      direction: 'more',
      levels: { kind: 'candidates' },
      limit: { kind: 'at-least', figure: 50 },
    };
    const { totals } = rankRows([[0], [75], [100]], [1], [open]);
    expect(totals[1]).toBe(0.75);
  });

  test('a missing figure fails no limit, an orbit out of reach fails it', () => {
    const { setAside, incomplete } = rankRows(
      [
        [null, 10],
        ['worst', 10],
        [80, 10],
      ],
      [1, 1],
      criteria,
    );
    expect(setAside).toEqual([1]);
    expect(incomplete.map((entry) => entry.site)).toEqual([0]);
  });
});

describe('missing figures', () => {
  test('the rank range counts ranked sites alone', () => {
    // Ranked: 0.9, 0.6, 0.3. The gap weighs a half: 0.25 to 0.75, so rank 2 to 4; the other incomplete site, 0 to 0.5, 3 to 4.
    const { incomplete, ranked, totals, ceilings } = rankRows(
      [
        [90, 90],
        [60, 60],
        [30, 30],
        [50, null],
        [0, null],
      ],
      [1, 1],
    );
    expect([...ranked]).toEqual([0, 1, 2]);
    expect(incomplete).toEqual([
      { site: 3, bestRank: 2, worstRank: 4 },
      { site: 4, bestRank: 3, worstRank: 4 },
    ]);
    expect([totals[3], ceilings[3]]).toEqual([0.25, 0.75]);
  });

  test('a gap where nothing is weighed leaves the site ranked, unless a limit hangs on it', () => {
    expect([...rankRows([[50, null]], [1, 0]).ranked]).toEqual([0]);
    const limited = [percent(), percent({ kind: 'at-least', figure: 1 })];
    expect(rankRows([[50, null]], [1, 0], limited).incomplete).toEqual([
      { site: 0, bestRank: 1, worstRank: 1 },
    ]);
  });

  test('an orbit out of reach counts at the worst level and is no gap', () => {
    const { ranked, totals, incomplete } = rankRows(
      [
        [50, 'worst'],
        [50, 20],
      ],
      [1, 1],
    );
    expect(incomplete).toEqual([]);
    expect([...ranked]).toEqual([1, 0]);
    expect(totals[0]).toBe(0.25);
  });
});

describe('weights and terms', () => {
  test('a term is the weight times the value', () => {
    const prepared = prepare([percent(), percent()], figureTable([[80, 30]]));
    expect(termOf(prepared, weigh(3, 1), 0, 0)).toBeCloseTo(0.6, 15);
    expect(termOf(prepared, weigh(3, 1), 0, 1)).toBeCloseTo(0.075, 15);
  });

  test('points whose sum overflows still make weights that sum to 1', () => {
    expect([...weigh(1e308, 1e308, 0)]).toEqual([0.5, 0.5, 0]);
    expect([...weigh(60, 40)]).toEqual([0.6, 0.4]);
  });

  test('no points at all set no weights', () => {
    expect(weightsFromPoints([0, 0])).toEqual({ kind: 'unset' });
    expect(weightsFromPoints([])).toEqual({ kind: 'unset' });
  });

  test.each([[-1], [NaN], [Infinity]])('refuses %s points', (points) => {
    expect(() => weightsFromPoints([1, points])).toThrow(RangeError);
  });

  test('refuses tables, criteria and weights of different sizes', () => {
    expect(() => figureTable([[1], [1, 2]])).toThrow(RangeError);
    expect(() => figureTable([[NaN]])).toThrow(RangeError);
    expect(() => prepare([percent()], figureTable([[1, 2]]))).toThrow(RangeError);
    expect(() => rank(prepare([percent()], figureTable([[1]])), weigh(1, 1))).toThrow(RangeError);
  });
});

import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Criterion } from '#core/decision/criterion.ts';
import { figureTable, type Cell } from '#core/decision/figures.ts';
import { prepare } from '#core/decision/prepare.ts';
import { rank, termOf } from '#core/decision/rank.ts';
import { weightsFromPoints } from '#core/decision/weights.ts';

interface Study {
  criteria: Criterion[];
  points: number[];
  rows: Cell[][];
}

const figure = fc.integer({ min: -50, max: 50 });
const cell: fc.Arbitrary<Cell> = fc.oneof(
  { weight: 8, arbitrary: figure },
  { weight: 1, arbitrary: fc.constant(null) },
  { weight: 1, arbitrary: fc.constant('worst' as const) },
);
const criterion: fc.Arbitrary<Criterion> = fc
  .record({
    direction: fc.constantFrom('more' as const, 'less' as const),
    fixed: fc.option(fc.tuple(fc.integer({ min: -60, max: 0 }), fc.integer({ min: 1, max: 60 }))),
    limit: fc.option(fc.record({ kind: fc.constantFrom('at-least' as const, 'at-most' as const), figure }), {
      freq: 4,
    }),
  })
  .map(({ direction, fixed, limit }) => ({
    direction,
    limit,
    levels:
      fixed === null
        ? { kind: 'candidates' }
        : {
            kind: 'fixed',
            worst: fixed[direction === 'more' ? 0 : 1],
            best: fixed[direction === 'more' ? 1 : 0],
          },
  }));
const study = (cells: fc.Arbitrary<Cell> = cell): fc.Arbitrary<Study> =>
  fc.integer({ min: 1, max: 6 }).chain((n) =>
    fc.record({
      criteria: fc.array(criterion, { minLength: n, maxLength: n }),
      points: fc.array(fc.integer({ min: 1, max: 100 }), { minLength: n, maxLength: n }),
      rows: fc.array(fc.array(cells, { minLength: n, maxLength: n }), { minLength: 1, maxLength: 12 }),
    }),
  );
const weigh = (points: number[]): Float64Array => {
  const result = weightsFromPoints(points);
  return result.kind === 'set' ? result.weights : new Float64Array(points.length);
};
const rankStudy = ({ criteria, points, rows }: Study) => {
  const prepared = prepare(criteria, figureTable(rows));
  return { prepared, ranking: rank(prepared, weigh(points)) };
};

describe('for any study', () => {
  test('scaling all points changes no rank and no value beyond rounding', () => {
    fc.assert(
      fc.property(study(), fc.double({ min: 1e-3, max: 1e3, noNaN: true }), (it, factor) => {
        const once = rankStudy(it).ranking;
        const scaled = rankStudy({ ...it, points: it.points.map((p) => p * factor) }).ranking;
        once.totals.forEach((total, site) => expect(scaled.totals[site]).toBeCloseTo(total, 12));
        expect(scaled.setAside).toEqual(once.setAside);
      }),
    );
  });

  test('the order in which sites are listed changes no value and no rank', () => {
    fc.assert(
      fc.property(study(), fc.infiniteStream(fc.nat()), (it, stream) => {
        const order = it.rows.map((_, site) => ({ site, key: stream.next().value ?? 0 }));
        order.sort((a, b) => a.key - b.key);
        const first = rankStudy(it).ranking;
        const second = rankStudy({ ...it, rows: order.map(({ site }) => it.rows[site] ?? []) }).ranking;
        const rankOf = (r: typeof first, site: number) => r.ranks[r.ranked.indexOf(site)];
        order.forEach(({ site }, place) => {
          expect(second.totals[place]).toBe(first.totals[site]);
          expect(rankOf(second, place)).toBe(rankOf(first, site));
        });
      }),
    );
  });

  test('values and totals lie in 0 to 1, terms add up to the total, weights to 1', () => {
    fc.assert(
      fc.property(study(), (it) => {
        const { prepared, ranking } = rankStudy(it);
        const weights = weigh(it.points);
        expect(weights.reduce((sum, w) => sum + w, 0)).toBeCloseTo(1, 12);
        prepared.values.forEach((v) => expect(v >= 0 && v <= 1).toBe(true));
        ranking.totals.forEach((total, site) => {
          const terms = it.criteria.map((_, j) => termOf(prepared, weights, site, j));
          expect(terms.reduce((sum, term) => sum + term, 0)).toBeCloseTo(total, 12);
          expect(total).toBeLessThanOrEqual(ranking.ceilings[site] ?? 0);
          expect(ranking.ceilings[site]).toBeLessThanOrEqual(1 + 1e-12);
        });
      }),
    );
  });

  test('every site stands in exactly one of ranked, incomplete and set aside', () => {
    fc.assert(
      fc.property(study(), (it) => {
        const { ranked, incomplete, setAside } = rankStudy(it).ranking;
        const listed = [...ranked, ...incomplete.map(({ site }) => site), ...setAside].sort((a, b) => a - b);
        expect(listed).toEqual(it.rows.map((_, site) => site));
      }),
    );
  });

  test('an incomplete site, its gaps filled at either end, takes a rank inside its range', () => {
    fc.assert(
      fc.property(study(), (it) => {
        // Fixed levels without limits: filling a gap then moves nothing else.
        const criteria = it.criteria.map(({ direction }): Criterion => ({
          direction,
          limit: null,
          levels: {
            kind: 'fixed',
            worst: direction === 'more' ? -50 : 50,
            best: direction === 'more' ? 50 : -50,
          },
        }));
        const { incomplete, ranked } = rankStudy({ ...it, criteria }).ranking;
        for (const { site, bestRank, worstRank } of incomplete) {
          for (const end of ['best', 'worst'] as const) {
            const filled = criteria.map((c, j) => {
              const own = it.rows[site]?.[j] ?? null;
              return own ?? ((end === 'best') === (c.direction === 'more') ? 50 : -50);
            });
            const rows = [...[...ranked].map((other) => it.rows[other] ?? []), filled];
            const again = rankStudy({ criteria, points: it.points, rows }).ranking;
            const got = again.ranks[again.ranked.indexOf(rows.length - 1)] ?? 0;
            expect(got).toBe(end === 'best' ? bestRank : worstRank);
          }
        }
      }),
    );
  });

  test('a site another beats on every criterion never leads', () => {
    fc.assert(
      fc.property(study(figure), fc.nat(), (it, pick) => {
        const criteria = it.criteria.map((c): Criterion => ({
          ...c,
          levels: { kind: 'candidates' },
          limit: null,
        }));
        const dominated = it.rows[pick % it.rows.length] ?? [];
        const better = dominated.map((x, j) => Number(x) + (criteria[j]?.direction === 'more' ? 1 : -1));
        const { ranked, ranks } = rankStudy({
          criteria,
          points: it.points,
          rows: [...it.rows, better],
        }).ranking;
        expect(ranks[ranked.indexOf(pick % it.rows.length)]).toBeGreaterThan(1);
      }),
    );
  });
});

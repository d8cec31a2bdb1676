import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  acceptability,
  acceptabilityRun,
  standardError,
  type AcceptabilityQuestion,
} from '#core/decision/acceptability.ts';
import type { WeightModel } from '#core/decision/weight-model.ts';
import { reference } from '#tests/support/reference.ts';
import { preparedValues } from './tables.ts';

/** Rows of figures, or low/likely/high, as a question without samples and seed. */
function questionOf(text: string, model: string): Omit<AcceptabilityQuestion, 'samples' | 'seed'> {
  const cells = text.split('|').map((row) => row.split(';').map((cell) => cell.split('/').map(Number)));
  const likely = cells.map((row) => row.map(([low = NaN, middle = low]) => middle));
  const criterionCount = likely[0]?.length ?? 0;
  const uncertain = cells.flatMap((row, site) =>
    row.flatMap(([low = NaN, middle, high], criterion) =>
      middle === undefined || high === undefined ? [] : { site, criterion, low, likely: middle, high },
    ),
  );
  const [kind, middle = '', band] = model.split(':');
  const weights: WeightModel =
    kind === 'band'
      ? { kind, weights: Float64Array.from(middle.split(';'), Number), band: Number(band) }
      : kind === 'order'
        ? { kind, order: Array.from({ length: criterionCount }, (_, j) => j) }
        : { kind: 'simplex', criterionCount };
  return { prepared: preparedValues(likely), uncertain, weights };
}

const bandText = (text: string): string => text.replace(/^band:([^:]+):([^:]+):/, 'band:$1;$2:');

describe('acceptability', () => {
  const answers = new Map<string, ReturnType<typeof acceptability>>();
  const answerOf = (rows: string, model: string) => {
    const key = `${rows} ${model}`;
    const answer =
      answers.get(key) ?? acceptability({ ...questionOf(rows, bandText(model)), samples: 200_000, seed: 20 });
    answers.set(key, answer);
    return answer;
  };

  test.each(reference('decision-acceptability'))('$id', (row) => {
    const { shares, wins, centralWeights, confidence } = answerOf(row.rows, row.model);
    const [site, place] = [Number(row.site), Number(row.place)];
    const figures: Record<string, number | null | undefined> = {
      share: shares[site * centralWeights.length + place],
      win: wins[site * centralWeights.length + place],
      centre: centralWeights[site]?.[place],
      confidence: confidence[site],
    };
    expect(figures[row.quantity] ?? NaN).toBeWithin(row.expected, row.tolerance);
  });

  const value = fc.integer({ min: 0, max: 10 }).map((v) => v / 10);
  const rows = fc
    .integer({ min: 1, max: 4 })
    .chain((n) => fc.array(fc.array(value, { minLength: n, maxLength: n }), { minLength: 1, maxLength: 6 }));
  const ask = (it: number[][], uncertain: AcceptabilityQuestion['uncertain'] = [], seed = 7) =>
    acceptability({
      prepared: preparedValues(it),
      uncertain,
      weights: { kind: 'simplex', criterionCount: it[0]?.length ?? 0 },
      samples: 200,
      seed,
    });
  const spread = (it: number[][]) =>
    it.flatMap((row, site) =>
      row.map((likely, criterion) => ({
        site,
        criterion,
        low: Math.max(0, likely - 0.2),
        likely,
        high: Math.min(1, likely + 0.1),
      })),
    );

  test('shares sum to 1 by site and by rank, ties and uncertain figures among them', () => {
    fc.assert(
      fc.property(rows, fc.boolean(), (it, open) => {
        const { shares } = ask(it, open ? spread(it) : []);
        const n = it.length;
        for (let k = 0; k < n; k++) {
          const row = shares.subarray(k * n, (k + 1) * n).reduce((sum, p) => sum + p, 0);
          const column = it.reduce((sum, _, site) => sum + (shares[site * n + k] ?? 0), 0);
          expect(row).toBeCloseTo(1, 10);
          expect(column).toBeCloseTo(1, 10);
        }
      }),
      { numRuns: 40 },
    );
  });

  test('winning shares of a pair sum to 1, and those against a site to its mean rank less 1', () => {
    fc.assert(
      fc.property(rows, fc.boolean(), (it, open) => {
        const { shares, wins } = ask(it, open ? spread(it) : []);
        const n = it.length;
        it.forEach((_, site) => {
          // [derived] a mean rank is 1 + the sites above + half of those level.
          let [meanRank, above] = [0, 0];
          it.forEach((__, other) => {
            meanRank += (other + 1) * (shares[site * n + other] ?? NaN);
            above += wins[other * n + site] ?? NaN;
            const both = (wins[site * n + other] ?? NaN) + (wins[other * n + site] ?? NaN);
            expect(both).toBeCloseTo(site === other ? 0 : 1, 12);
          });
          expect(meanRank).toBeCloseTo(1 + above, 9);
        });
      }),
      { numRuns: 40 },
    );
  });

  test('a run cut into steps of any size gives the same to the last digit', () => {
    fc.assert(
      fc.property(rows, fc.boolean(), fc.integer({ min: 1, max: 250 }), (it, open, size) => {
        const question: AcceptabilityQuestion = {
          prepared: preparedValues(it),
          uncertain: open ? spread(it) : [],
          weights: { kind: 'simplex', criterionCount: it[0]?.length ?? 0 },
          samples: 200,
          seed: 7,
        };
        const run = acceptabilityRun(question);
        let steps = 0;
        for (; !run.step(size); steps++) {
          expect(run.done).toBe((steps + 1) * size);
          expect(() => run.result()).toThrow(RangeError);
        }
        expect(run.done).toBe(run.total);
        expect(steps).toBe(Math.ceil(run.total / size) - 1);
        expect(run.result()).toEqual(acceptability(question));
      }),
      { numRuns: 40 },
    );
  });

  test('the standard error of a share is √(p(1 − p)/N)', () => {
    // [derived] 10,000 draws: .005 at a half, √(.1 × .9)/100 at a tenth.
    expect(standardError(0.5, 10_000)).toBeCloseTo(0.005, 15);
    expect(standardError(0.1, 10_000)).toBeCloseTo(0.003, 15);
    expect([standardError(0, 100), standardError(1, 100)]).toEqual([0, 0]);
  });

  test('a site that another beats everywhere never leads: no central weights, no confidence', () => {
    fc.assert(
      fc.property(rows, (it) => {
        const worse = (it[0] ?? []).map((v) => v - 0.05);
        const raised = it.map((row) => row.map((v) => 0.1 + 0.9 * v));
        const { centralWeights, confidence, shares } = ask([
          ...raised,
          worse.map((v) => Math.max(0, v) * 0.9),
        ]);
        expect(shares[it.length * (it.length + 1)]).toBe(0);
        expect([centralWeights[it.length], confidence[it.length]]).toEqual([null, null]);
      }),
      { numRuns: 40 },
    );
  });

  test('the same seed gives the same to the last digit, another seed another', () => {
    const it = [
      [0.2, 0.9, 0.4],
      [0.8, 0.3, 0.5],
      [0.5, 0.5, 0.6],
    ];
    expect(ask(it, spread(it))).toEqual(ask(it, spread(it)));
    expect(ask(it, spread(it), 8).shares).not.toEqual(ask(it, spread(it)).shares);
  });

  test('a site’s confidence falls as its figures grow uncertain', () => {
    const it = [
      [0.6, 0.5],
      [0.5, 0.55],
    ];
    expect(ask(it).confidence[0]).toBe(1);
    expect(ask(it, spread(it)).confidence[0]).toBeLessThan(1);
  });

  test('refuses no samples, a seed that is none, weights of another number, gaps, and steps of nothing', () => {
    const question = { ...questionOf('1;0|0;1', 'simplex'), samples: 10, seed: 1 };
    expect(() => acceptability({ ...question, samples: 0 })).toThrow(RangeError);
    expect(() => acceptability({ ...question, seed: -1 })).toThrow(RangeError);
    expect(() => acceptability({ ...question, weights: { kind: 'simplex', criterionCount: 3 } })).toThrow(
      RangeError,
    );
    for (const draws of [0, NaN]) expect(() => acceptabilityRun(question).step(draws)).toThrow(RangeError);
    const gap = { ...question.prepared, gaps: Uint8Array.of(0, 1) };
    expect(() => acceptability({ ...question, prepared: gap })).toThrow(/site 1/);
  });
});

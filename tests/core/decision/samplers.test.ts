import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fallingOrder } from '#core/decision/falling-order.ts';
import { splitMix64, streamFrom, xoshiro128 } from '#core/decision/random.ts';
import { valueSampler } from '#core/decision/uncertain.ts';
import { weightSampler, type WeightModel } from '#core/decision/weight-model.ts';
import { reference } from '#tests/support/reference.ts';
import { preparedValues } from './tables.ts';

const DRAWS = 40_000;

describe('random stream', () => {
  const uniforms = new Float64Array(10);
  xoshiro128(Uint32Array.of(1, 2, 3, 4)).fill(uniforms);
  const words = Array.from(uniforms, (u) => String(u * 2 ** 32 - 0.5));
  const seeds = splitMix64(1234567, 5).map(String);

  test.each(reference('random-streams'))('$id', (row) => {
    const drawn = row.generator === 'splitmix64' ? seeds : words;
    expect(drawn[Number(row.place)]).toBe(row.printed);
  });

  test('goes on where the last buffer ended', () => {
    const [whole, first, second] = [new Float64Array(7), new Float64Array(3), new Float64Array(4)];
    streamFrom(5).fill(whole);
    const stream = streamFrom(5);
    stream.fill(first);
    stream.fill(second);
    expect([...first, ...second]).toEqual([...whole]);
  });
});

describe('weights', () => {
  const middle = Float64Array.of(0.5, 0.3, 0.2);
  const drawAll = (model: WeightModel, count: number): number[][] => {
    const [draw, random, weights] = [weightSampler(model), streamFrom(3), new Float64Array(count)];
    return Array.from({ length: DRAWS }, () => {
      draw(weights, random);
      return [...weights];
    });
  };
  const model = fc.oneof(
    fc
      .integer({ min: 1, max: 8 })
      .map((criterionCount): [WeightModel, number] => [{ kind: 'simplex', criterionCount }, criterionCount]),
    fc
      .integer({ min: 1, max: 8 })
      .map((n): [WeightModel, number] => [
        { kind: 'order', order: Array.from({ length: n }, (_, j) => n - 1 - j) },
        n,
      ]),
    fc
      .double({ min: 0, max: 1, noNaN: true })
      .map((band): [WeightModel, number] => [{ kind: 'band', weights: middle, band }, 3]),
  );

  test('never negative, sum to 1, and keep to their model', () => {
    fc.assert(
      fc.property(model, fc.nat(), ([it, count], seed) => {
        const weights = new Float64Array(count);
        weightSampler(it)(weights, streamFrom(seed));
        expect(weights.reduce((sum, w) => sum + w, 0)).toBeCloseTo(1, 12);
        weights.forEach((w, j) => {
          expect(w).toBeGreaterThanOrEqual(-1e-15);
          if (it.kind === 'order' && j > 0) expect(w).toBeGreaterThanOrEqual(weights[j - 1] ?? 0);
          if (it.kind === 'band')
            expect(Math.abs(w - (middle[j] ?? 0))).toBeLessThanOrEqual(it.band * (middle[j] ?? 0) + 1e-15);
        });
      }),
    );
  });

  test('on the simplex: P(w > x) = (1 − x)^(n − 1) for each of n', () => {
    const draws = drawAll({ kind: 'simplex', criterionCount: 4 }, 4);
    for (const j of [0, 1, 2, 3]) {
      const share = draws.filter((w) => (w[j] ?? 0) > 0.3).length / DRAWS;
      // [derived] Dirichlet(1, 1, 1, 1): .7³; five standard errors.
      expect(share).toBeWithin(0.343, 5 * Math.sqrt((0.343 * 0.657) / DRAWS));
    }
  });

  test('in a band: uniform on the part of the simplex, not a box made to sum to 1', () => {
    // [derived] w2 and w3 uniform in ±.15 and ±.1, thrown away where |Δ2 + Δ3| > .25: here never, so w2 is uniform.
    const draws = drawAll({ kind: 'band', weights: middle, band: 0.5 }, 3);
    const share = draws.filter((w) => (w[1] ?? 0) < 0.225).length / DRAWS;
    expect(share).toBeWithin(0.25, 5 * Math.sqrt((0.25 * 0.75) / DRAWS));
    // Three equal weights, whole bands: Δ1 + Δ2 within ±1/3 of a square ±1/3 keeps 3/4 of it; of the kept part a share
    // of 1/3 has w3 < 1/6 or w3 > 1/2 … by the area of a hexagon cut at half its width on both sides: 5/12.
    const equal = drawAll({ kind: 'band', weights: new Float64Array(3).fill(1 / 3), band: 1 }, 3);
    for (const j of [0, 1, 2]) {
      const outer = equal.filter((w) => Math.abs((w[j] ?? 0) - 1 / 3) > 1 / 6).length / DRAWS;
      expect(outer).toBeWithin(5 / 12, 5 * Math.sqrt((5 * 7) / 144 / DRAWS));
    }
  });

  test('a band of 0 gives the weights themselves', () => {
    expect(drawAll({ kind: 'band', weights: middle, band: 0 }, 3)[0]).toEqual([...middle]);
  });

  test.each<[string, WeightModel]>([
    ['a band beyond 1', { kind: 'band', weights: middle, band: 1.1 }],
    ['a negative weight', { kind: 'band', weights: Float64Array.of(1.5, -0.5), band: 0.5 }],
    ['an order that names a criterion twice', { kind: 'order', order: [0, 0, 1] }],
  ])('refuses %s', (_, it) => {
    expect(() => weightSampler(it)).toThrow(RangeError);
  });
});

describe('uncertain figures', () => {
  const drawFigure = (low: number, likely: number, high: number): number[] => {
    const prepared = preparedValues([[likely]]);
    const draw = valueSampler(prepared, [{ site: 0, criterion: 0, low, likely, high }]);
    const [random, values] = [streamFrom(11), Float64Array.of(-1)];
    return Array.from({ length: DRAWS }, () => {
      draw(values, random);
      return values[0] ?? NaN;
    });
  };

  test.each([
    [0, 0.5, 1],
    [0, 0.1, 1],
    [0.2, 0.2, 0.8],
    [0.1, 0.9, 0.9],
  ])('%s, %s, %s: shares below a bound follow the triangular distribution', (a, m, b) => {
    const drawn = drawFigure(a, m, b);
    for (const x of [0.25, 0.4, 0.6, 0.75].map((t) => a + t * (b - a))) {
      // [derived] the closed form of the distribution; five standard errors.
      const below = x <= m ? (x - a) ** 2 / ((b - a) * (m - a)) : 1 - (b - x) ** 2 / ((b - a) * (b - m));
      const share = drawn.filter((value) => value < x).length / DRAWS;
      expect(share).toBeWithin(below, 5 * Math.sqrt((below * (1 - below)) / DRAWS));
    }
  });

  test('stay within low and high; low equal to high is left as prepared', () => {
    expect(Math.min(...drawFigure(0.3, 0.4, 0.6))).toBeGreaterThan(0.3);
    expect(Math.max(...drawFigure(0.3, 0.4, 0.6))).toBeLessThan(0.6);
    expect(new Set(drawFigure(0.4, 0.4, 0.4))).toEqual(new Set([-1]));
  });

  test('refuses a likely figure outside low and high', () => {
    expect(() => drawFigure(0.5, 0.4, 0.6)).toThrow(RangeError);
  });
});

test('order falls and keeps figures with their owners, at any length', () => {
  fc.assert(
    fc.property(fc.array(fc.double({ noNaN: true }), { maxLength: 300 }), (list) => {
      const figures = Float64Array.from(list);
      const owners = Uint32Array.from(list, (_, k) => k);
      fallingOrder(figures, owners);
      expect([...figures]).toEqual([...Float64Array.from(list).sort()].reverse().map((x) => x));
      owners.forEach((owner, place) => expect(figures[place]).toBe(list[owner]));
    }),
  );
});

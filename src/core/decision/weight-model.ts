import type { RandomStream } from './random.ts';

/**
 * Which weights are thought possible, each uniform on its part of the simplex of non-negative weights summing to 1.
 * `simplex`: all of it. `band`: within ± `band` × w_j of the weights w, 0 ≤ band ≤ 1. `order`: those that fall, or stay
 * level, along `order`, which names every criterion once by its place.
 */
export type WeightModel =
  | { kind: 'simplex'; criterionCount: number }
  | { kind: 'band'; weights: Float64Array; band: number }
  | { kind: 'order'; order: readonly number[] };

/** Writes one draw of weights into `weights`. */
export type DrawWeights = (weights: Float64Array, random: RandomStream) => void;

export const criterionCountOf = (model: WeightModel): number =>
  model.kind === 'simplex'
    ? model.criterionCount
    : (model.kind === 'band' ? model.weights : model.order).length;

/**
 * Makes the sampler of a weight model.
 * @throws RangeError when a band is not 0…1 or its weights are negative, or an order does not name every criterion once.
 * @see references.ts `tervonenLahdelma`; checked by tests/core/decision/weight-model.test.ts
 */
export function weightSampler(model: WeightModel): DrawWeights {
  if (model.kind === 'simplex') return simplexSampler(model.criterionCount);
  return model.kind === 'band' ? bandSampler(model.weights, model.band) : orderSampler(model.order);
}

/** Few figures at a time: plain insertion is quickest. */
function sortRising(list: Float64Array): void {
  for (let k = 1; k < list.length; k++) {
    const moved = list[k] ?? 0;
    let at = k;
    for (; at > 0 && (list[at - 1] ?? 0) > moved; at--) list[at] = list[at - 1] ?? 0;
    list[at] = moved;
  }
}

/** The gaps between n − 1 sorted uniform figures are uniform on the simplex. */
function simplexSampler(criterionCount: number): DrawWeights {
  const cuts = new Float64Array(criterionCount - 1);
  return (weights, random) => {
    random.fill(cuts);
    sortRising(cuts);
    let before = 0;
    for (let j = 0; j < cuts.length; j++) {
      const cut = cuts[j] ?? 0;
      weights[j] = cut - before;
      before = cut;
    }
    weights[cuts.length] = 1 - before;
  };
}

/** The simplex is the same under any exchange of criteria, so sorting a draw from all of it keeps it uniform. */
function orderSampler(order: readonly number[]): DrawWeights {
  if ([...order].sort((a, b) => a - b).some((place, k) => place !== k))
    throw new RangeError(`weights: the order ${order.join(', ')} does not name every criterion once`);
  const draw = simplexSampler(order.length);
  const sorted = new Float64Array(order.length);
  return (weights, random) => {
    draw(sorted, random);
    sortRising(sorted);
    order.forEach((criterion, place) => {
      weights[criterion] = sorted[order.length - 1 - place] ?? 0;
    });
  };
}

/**
 * All weights but the largest are drawn within their bands, the largest takes what is left, and a draw that puts it
 * outside its own band is thrown away: what stays is uniform. At worst, n equal weights, some √(6/(π n)) of draws stay.
 */
function bandSampler(middle: Float64Array, band: number): DrawWeights {
  if (!(band >= 0 && band <= 1)) throw new RangeError(`weights: the band ${band} is not 0 to 1`);
  if (middle.some((w) => !(w >= 0))) throw new RangeError('weights: a weight is negative');
  const largest = middle.indexOf(Math.max(...middle));
  const allowed = band * (middle[largest] ?? 0);
  const uniforms = new Float64Array(middle.length - 1);
  return (weights, random) => {
    let moved = 0;
    do {
      random.fill(uniforms);
      moved = 0;
      for (let j = 0; j < middle.length; j++) {
        if (j === largest) continue;
        const w = middle[j] ?? 0;
        const change = band * w * (2 * (uniforms[j < largest ? j : j - 1] ?? 0) - 1);
        weights[j] = w + change;
        moved += change;
      }
    } while (Math.abs(moved) > allowed);
    weights[largest] = (middle[largest] ?? 0) - moved;
  };
}

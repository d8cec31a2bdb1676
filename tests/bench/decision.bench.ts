import { figureTable } from '#core/decision/figures.ts';
import { prepare } from '#core/decision/prepare.ts';
import { rank } from '#core/decision/rank.ts';
import { weightsFromPoints } from '#core/decision/weights.ts';

const SITES = 5_000;
const CRITERIA = 20;
const ROUNDS = 200;

/** Numerical Recipes' 32-bit linear congruential step: the bench needs figures that are the same each time, no more. */
function* uniforms(seed: number): Generator<number, never> {
  for (let state = seed; ;) {
    state = (state * 1_664_525 + 1_013_904_223) >>> 0;
    yield state / 2 ** 32;
  }
}

/** Times one change of weights over a large study, and its preparation; the goal for a change is under 16 ms. */
export async function benchDecision(): Promise<string[]> {
  const random = uniforms(42);
  const next = () => random.next().value;
  const rows = Array.from({ length: SITES }, () =>
    Array.from({ length: CRITERIA }, () => (next() < 0.001 ? null : next() * 1_000)),
  );
  const criteria = Array.from({ length: CRITERIA }, (_, j) => ({
    direction: j % 2 === 0 ? ('more' as const) : ('less' as const),
    levels: { kind: 'candidates' as const },
    limit: j < 3 ? { kind: 'at-least' as const, figure: 20 } : null,
  }));
  const started = performance.now();
  const prepared = prepare(criteria, figureTable(rows));
  const preparedMs = performance.now() - started;
  const times = Array.from({ length: ROUNDS }, () => {
    const weights = weightsFromPoints(Array.from({ length: CRITERIA }, next));
    if (weights.kind === 'unset') throw new Error('the bench drew no points');
    const from = performance.now();
    rank(prepared, weights.weights);
    return performance.now() - from;
  }).sort((a, b) => a - b);
  const median = times[ROUNDS / 2] ?? NaN;
  const slow = times[Math.floor(ROUNDS * 0.95)] ?? NaN;
  return [
    `decision: ${SITES} sites × ${CRITERIA} criteria prepared in ${preparedMs.toFixed(1)} ms`,
    `decision: re-ranked in ${median.toFixed(2)} ms (median), ${slow.toFixed(2)} ms (95th of 100); goal under 16 ms`,
  ];
}

import { compare, MOST_COMPARED } from './pairwise.ts';
import type { Judgement } from './statement.ts';

/** The furthest two things may lie apart in a judgement. */
const FURTHEST = 9;
/** Room for 1/9 written with few digits. */
const ROUNDING = 1e-6;

/** How far the judgements of a level agree with one another. */
export interface Consistency {
  lambdaMax: number;
  /** (λ_max − n)/(n − 1). */
  index: number;
  /** Consistency index over the random index; above 0.10 judge again. */
  ratio: number;
  /** The judgement that disagrees most with the weights, greatest |ln(a_ij w_j/w_i)|, the one judged heavier first. */
  worst: [heavier: string, lighter: string];
  /** How many times the weights say the first of `worst` outweighs the second. */
  implied: number;
}

export interface Judged {
  /** By `ids`, summing to 1. */
  weights: Float64Array;
  /** Null for one thing alone. */
  consistency: Consistency | null;
}

/**
 * The ids of a level that have been judged: against another of the level, or against one that is gone.
 * @param ids those of the level.
 * @param all every id that exists, of all levels: one that moved to another level is judged there no more.
 */
export function judgedIds(
  ids: readonly string[],
  judgements: readonly Judgement[],
  all: ReadonlySet<string>,
): string[] {
  const own = new Set(ids);
  const counts = (other: string): boolean => own.has(other) || !all.has(other);
  const judged = new Set(
    judgements.flatMap(([a, b]) => [...(counts(b) ? [a] : []), ...(counts(a) ? [b] : [])]),
  );
  return ids.filter((id) => judged.has(id));
}

/** The pairs of ids that no judgement compares, in the order of the ids. */
export function missingPairs(
  ids: readonly string[],
  judgements: readonly Judgement[],
): [first: string, second: string][] {
  const ratios = ratiosOf(judgements);
  return ids.flatMap((a, i) =>
    ids.slice(i + 1).flatMap((b): [string, string][] => (ratios.get(a)?.has(b) ? [] : [[a, b]])),
  );
}

/**
 * Weights of things that have all been judged against one another.
 * @param ids at least one; at most 10.
 * @throws RangeError when there are more, a pair is not judged or judged twice, or a ratio is not 1/9 to 9.
 */
export function weightsFromJudgements(ids: readonly string[], judgements: readonly Judgement[]): Judged {
  if (ids.length > MOST_COMPARED)
    throw new RangeError(`judgements: ${ids.length} things to compare where ${MOST_COMPARED} is the most`);
  const [missing] = missingPairs(ids, judgements);
  if (missing) throw new RangeError(`judgements: none compares ${missing.join(' and ')}`);
  const ratios = ratiosOf(judgements);
  if (ids.length < 2) return { weights: new Float64Array(ids.length).fill(1), consistency: null };
  const matrix = ids.map((a) => ids.map((b) => (a === b ? 1 : (ratios.get(a)?.get(b) ?? NaN))));
  const { weights, lambdaMax, consistencyIndex, consistencyRatio, worst } = compare(matrix);
  const [row, column] = worst;
  const [heavier, lighter] = (matrix[row]?.[column] ?? 1) >= 1 ? [row, column] : [column, row];
  const consistency: Consistency = {
    lambdaMax,
    index: consistencyIndex,
    ratio: consistencyRatio,
    worst: [ids[heavier] ?? '', ids[lighter] ?? ''],
    implied: (weights[heavier] ?? 0) / (weights[lighter] ?? 1),
  };
  return { weights, consistency };
}

/** Both directions of every judgement. */
function ratiosOf(judgements: readonly Judgement[]): Map<string, Map<string, number>> {
  const ratios = new Map<string, Map<string, number>>();
  const put = (a: string, b: string, ratio: number): void => {
    const row = ratios.get(a) ?? new Map<string, number>();
    if (a === b || row.has(b)) throw new RangeError(`judgements: ${a} against ${b} is judged twice`);
    ratios.set(a, row.set(b, ratio));
  };
  for (const [a, b, ratio] of judgements) {
    if (!(ratio >= 1 / FURTHEST - ROUNDING && ratio <= FURTHEST + ROUNDING))
      throw new RangeError(`judgements: ${ratio} is not 1/9 to 9`);
    put(a, b, ratio);
    put(b, a, 1 / ratio);
  }
  return ratios;
}

import { acceptability, type Acceptability } from '#core/decision/acceptability.ts';
import { dominators } from '#core/decision/dominance.ts';
import { figureTable } from '#core/decision/figures.ts';
import { leaderChanges, type Change } from '#core/decision/leader-change.ts';
import { completeValues } from '#core/decision/overall.ts';
import { prepare, type Prepared } from '#core/decision/prepare.ts';
import { rank, termOf } from '#core/decision/rank.ts';
import { closeness } from '#core/decision/topsis.ts';
import type { UncertainFigure } from '#core/decision/uncertain.ts';
import type { WeightModel } from '#core/decision/weight-model.ts';
import type { DecideFigure, DecideInput, DecideOutput } from './decide.ts';
import { criterionOf } from './value-function.ts';

const likelyOf = (figure: DecideFigure): number => (typeof figure === 'number' ? figure : figure.likely);

/** The codes of a request, for records keyed by them. */
interface Codes {
  criteria: string[];
  alternatives: string[];
}

const keyed = <T>(codes: readonly string[], entry: (place: number) => T): Record<string, T> =>
  Object.fromEntries(codes.map((code, place) => [code, entry(place)]));

/**
 * A decision as it crosses the wire: the one place where the contract meets core, for the server's main thread and its
 * workers alike.
 */
export function decide(input: DecideInput): DecideOutput {
  const codes = {
    criteria: input.criteria.map(({ code }) => code),
    alternatives: input.alternatives.map(({ code }) => code),
  };
  const figures = input.alternatives.map((alternative) =>
    codes.criteria.map((code) => alternative.figures[code] ?? NaN),
  );
  const prepared = prepare(
    input.criteria.map(criterionOf),
    figureTable(figures.map((row) => row.map(likelyOf))),
  );
  const weights = Float64Array.from(codes.criteria, (code) => input.weights[code] ?? NaN);
  const { ranked, ranks, totals } = rank(prepared, weights);
  return {
    ranking: Array.from(ranked, (place, at) => ({
      code: codes.alternatives[place] ?? '',
      rank: ranks[at] ?? 0,
      value: totals[place] ?? 0,
      terms: keyed(codes.criteria, (j) => termOf(prepared, weights, place, j)),
    })),
    ...compared(prepared, weights, ranked[0] ?? 0, codes),
    acceptability: drawn(input, prepared, weights, figures, codes),
  };
}

/** What two alternatives or more are needed for. */
function compared(prepared: Prepared, weights: Float64Array, leader: number, codes: Codes) {
  if (codes.alternatives.length < 2) return { topsis: null, dominatedBy: null, leaderChange: null };
  const table = completeValues(prepared);
  const close = closeness(table, weights);
  const above = dominators(table);
  const named = (change: Change | null) =>
    change && { weight: change.weight, leader: codes.alternatives[change.leader] ?? '' };
  return {
    topsis: codes.alternatives
      .map((code, place) => ({ code, closeness: close[place] ?? 0 }))
      .sort((a, b) => b.closeness - a.closeness),
    dominatedBy: keyed(codes.alternatives, (place) =>
      (above[place] ?? []).map((other) => codes.alternatives[other] ?? ''),
    ),
    leaderChange: leaderChanges(table, weights, leader).map(({ below, above: over }, j) => ({
      criterion: codes.criteria[j] ?? '',
      below: named(below),
      above: named(over),
    })),
  };
}

function modelOf(
  asked: NonNullable<DecideInput['acceptability']>['weights'],
  weights: Float64Array,
  criteria: readonly string[],
): WeightModel {
  if (asked === 'simplex') return { kind: 'simplex', criterionCount: criteria.length };
  if ('band' in asked) return { kind: 'band', weights, band: asked.band };
  return { kind: 'order', order: asked.order.map((code) => criteria.indexOf(code)) };
}

function uncertainOf(figures: readonly (readonly DecideFigure[])[]): UncertainFigure[] {
  return figures.flatMap((row, site) =>
    row.flatMap((figure, criterion) => (typeof figure === 'number' ? [] : { site, criterion, ...figure })),
  );
}

function drawn(
  { acceptability: asked }: DecideInput,
  prepared: Prepared,
  weights: Float64Array,
  figures: readonly (readonly DecideFigure[])[],
  codes: Codes,
): DecideOutput['acceptability'] {
  if (!asked) return null;
  const model = modelOf(asked.weights, weights, codes.criteria);
  const { samples, seed } = asked;
  return presented(
    acceptability({ prepared, uncertain: uncertainOf(figures), weights: model, samples, seed }),
    codes,
  );
}

function presented({ shares, centralWeights, confidence }: Acceptability, codes: Codes) {
  const count = codes.alternatives.length;
  return {
    shares: keyed(codes.alternatives, (site) => [...shares.subarray(site * count, (site + 1) * count)]),
    centralWeights: keyed(codes.alternatives, (site) => {
      const central = centralWeights[site];
      return central ? keyed(codes.criteria, (j) => central[j] ?? 0) : null;
    }),
    confidence: keyed(codes.alternatives, (site) => confidence[site] ?? null),
  };
}

/** A decision as JSON text in bytes. */
export function decisionBytes(input: DecideInput): Uint8Array<ArrayBuffer> {
  return new TextEncoder().encode(JSON.stringify(decide(input)));
}

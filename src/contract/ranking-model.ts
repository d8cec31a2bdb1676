/* A ranking worked out from figures and points: the one way, for the interface, the screens and the memo. */
import type { Criterion as WeighingCriterion } from '#core/decision/criterion.ts';
import { figureTable } from '#core/decision/figures.ts';
import { listing, type Listed } from '#core/decision/listing.ts';
import { prepare, type Prepared } from '#core/decision/prepare.ts';
import { rank, type Ranking as RankedTable } from '#core/decision/rank.ts';
import type { Criterion } from './criterion.ts';
import { decimalsOf } from './ranking-words.ts';
import type { RankingFigures, RankingState } from './ranking.ts';
import { weighNow } from './weighing.ts';
import type { WeightStatement } from './weights.ts';

/** Figures made ready for weighing; made once, ranked as often as the weights move. */
export interface PreparedFigures {
  figures: RankingFigures;
  prepared: Prepared;
  /** One count of decimals a criterion, for its figures. */
  decimals: readonly number[];
  /** Words of a cell by its place in the table. */
  notes: ReadonlyMap<number, string>;
}

/** A ranking under one statement of weights. */
export interface RankingModel extends PreparedFigures {
  state: RankingState;
  /** One a criterion; all 0 where nothing is said of them. */
  weights: Float64Array;
  table: RankedTable;
  /** Every site once where there are ranks; else only those set aside. */
  rows: Listed[];
}

function toWeighing({ direction, levels, shape, limit }: Criterion): WeighingCriterion {
  return {
    direction,
    levels:
      levels.mode === 'fixed'
        ? { kind: 'fixed', worst: levels.worst, best: levels.best }
        : { kind: 'candidates' },
    limit: limit && { kind: limit.kind, figure: limit.value },
    shape,
  };
}

export function prepareFigures(figures: RankingFigures): PreparedFigures {
  const { criteria, cells, notes } = figures;
  return {
    figures,
    prepared: prepare(criteria.map(toWeighing), figureTable(cells)),
    decimals: criteria.map((_, place) => decimalsOf(figures, place)),
    notes: new Map(notes.map(([site, criterion, words]) => [site * criteria.length + criterion, words])),
  };
}

export function rankFigures(ready: PreparedFigures, statement: WeightStatement): RankingModel {
  const { figures, prepared } = ready;
  const given = weighNow(figures.criteria, statement);
  const weights = given.kind === 'set' ? given.weights : new Float64Array(figures.criteria.length);
  const table = rank(prepared, weights);
  const state = stateOf(figures, given.kind === 'set');
  const rows = listing(table).filter((row) => state === 'ranked' || row.kind === 'set-aside');
  return { ...ready, state, weights, table, rows };
}

function stateOf({ sites, criteria }: RankingFigures, weighed: boolean): RankingState {
  if (sites.length === 0) return 'no-sites';
  if (criteria.length === 0) return 'no-criteria';
  return weighed ? 'ranked' : 'no-weights';
}

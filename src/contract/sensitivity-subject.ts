import { CELL } from '#core/decision/figures.ts';
import { criteriaOf } from '#core/decision/criteria-subset.ts';
import { completeValues, type ValueTable } from '#core/decision/overall.ts';
import type { Prepared } from '#core/decision/prepare.ts';
import { subsetOf } from '#core/decision/subset.ts';
import type { UncertainFigure } from '#core/decision/uncertain.ts';
import type { Criterion } from './criterion.ts';
import type { RankingModel } from './ranking-model.ts';
import type { RankingSite } from './ranking.ts';

/** What the methods of sensitivity look at: sites and criteria are places here, not in the whole study. */
export interface Subject {
  /** Ranked sites, best first, tied ones in the study's order. Levels stay those of all candidates. */
  sites: RankingSite[];
  /** Shared where they tie: 1, 2, 2, 4. */
  ranks: number[];
  totals: number[];
  criteria: Criterion[];
  /** Criteria without weight for which a ranked site has no figure: nothing can be said of them. */
  leftOut: Criterion[];
  prepared: Prepared;
  table: ValueTable;
  /** One a criterion, summing to 1. */
  weights: Float64Array;
  /** Entered figures with a low or a high; the side that is not said is the likely figure. */
  uncertain: UncertainFigure[];
}

/**
 * The ranked sites of a ranking, ready for the methods that compare sites.
 * @param most sites taken at most, from the first
 * @returns null where no site is ranked
 */
export function subjectOf(model: RankingModel, most = Infinity): Subject | null {
  const { state, figures, table, prepared } = model;
  const places = [...table.ranked.subarray(0, Math.min(most, table.ranked.length))];
  if (state !== 'ranked' || places.length === 0) return null;
  const whole = subsetOf(prepared, places);
  const known = figures.criteria.map((_, column) => isKnown(whole, column));
  const columns = [...known.keys()].filter((column) => known[column]);
  const part = columns.length === known.length ? whole : criteriaOf(whole, columns);
  return {
    sites: places.flatMap((place) => figures.sites[place] ?? []),
    ranks: [...table.ranks.subarray(0, places.length)],
    totals: places.map((place) => table.totals[place] ?? 0),
    criteria: figures.criteria.filter((_, column) => known[column]),
    leftOut: figures.criteria.filter((_, column) => !known[column]),
    prepared: part,
    table: completeValues(part),
    weights: Float64Array.from(columns, (column) => model.weights[column] ?? 0),
    uncertain: uncertainOf(model, places, columns),
  };
}

function isKnown({ table: { siteCount, criterionCount, states } }: Prepared, column: number): boolean {
  for (let site = 0; site < siteCount; site++) {
    if (states[site * criterionCount + column] === CELL.missing) return false;
  }
  return true;
}

function uncertainOf(
  { figures: { cells, particulars } }: RankingModel,
  places: readonly number[],
  columns: readonly number[],
): UncertainFigure[] {
  const siteAt = new Map(places.map((place, site) => [place, site]));
  const criterionAt = new Map(columns.map((column, criterion) => [column, criterion]));
  return particulars.flatMap(([place, column, { low, high }]) => {
    const [site, criterion] = [siteAt.get(place), criterionAt.get(column)];
    const likely = cells[place]?.[column];
    if (site === undefined || criterion === undefined || typeof likely !== 'number') return [];
    if (low === undefined && high === undefined) return [];
    // A side beyond the figure is no side: the figure may have been moved past it since.
    const least = Math.min(low ?? likely, likely);
    const most = Math.max(high ?? likely, likely);
    return [{ site, criterion, low: least, likely, high: most }];
  });
}

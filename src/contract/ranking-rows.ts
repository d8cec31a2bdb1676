import { failuresOf, type Listed } from '#core/decision/listing.ts';
import { CELL } from '#core/decision/figures.ts';
import { decimalsNeeded } from '#core/printed/figure.ts';
import type { RankingModel } from './ranking-model.ts';
import { figureText } from './rating.ts';
import type {
  Contribution,
  IncompleteSite,
  RankedSite,
  Ranking,
  RankingSite,
  SetAsideSite,
  WeighedCriterion,
} from './ranking.ts';
import type { WeightsOf } from './weights.ts';

/** A row of the list with everything a screen draws of it. */
export type RankingRow =
  | ({ kind: 'ranked' } & RankedSite)
  | ({ kind: 'incomplete' } & IncompleteSite)
  | ({ kind: 'set-aside' } & SetAsideSite);

/** The terms of a site's overall value, one a criterion. */
export function contributionsOf(model: RankingModel, site: number): Contribution[] {
  const { figures, prepared, weights, notes } = model;
  const { criterionCount, states, figures: numbers } = prepared.table;
  return figures.criteria.map(({ id }, j) => {
    const at = site * criterionCount + j;
    const missing = states[at] === CELL.missing;
    const value = prepared.values[at] ?? 0;
    const weight = weights[j] ?? 0;
    return {
      criterionId: id,
      figure: states[at] === CELL.figure ? (numbers[at] ?? 0) : null,
      value: missing ? null : value,
      weight,
      term: missing ? null : weight * value,
      note: notes.get(at) ?? null,
    };
  });
}

/** The limits a site fails, in words: "Payload a year 22.3 t/yr, limit ≥ 45". */
function reasonsOf(model: RankingModel, site: number): SetAsideSite['reasons'] {
  const { figures, prepared, notes } = model;
  return failuresOf(prepared, site).flatMap((j) => {
    const criterion = figures.criteria[j];
    if (!criterion?.limit) return [];
    const { id, name, unit, limit } = criterion;
    const at = site * prepared.table.criterionCount + j;
    const decimals = model.decimals[j] ?? 0;
    const figure =
      prepared.table.states[at] === CELL.figure
        ? [figureText(criterion, prepared.table.figures[at] ?? 0, decimals), unit].filter(Boolean).join(' ')
        : (notes.get(at) ?? 'out of reach');
    const bound = `${limit.kind === 'at-least' ? '≥' : '≤'} ${figureText(criterion, limit.value, decimalsNeeded([limit.value]))}`;
    return [{ criterionId: id, message: `${name} ${figure}, limit ${bound}` }];
  });
}

const NOWHERE: RankingSite = { siteId: '', code: '', name: '', latitudeDeg: 0, longitudeDeg: 0 };

/** One listed site with its terms and, where it has no plain rank, why. */
export function rowOf(model: RankingModel, listed: Listed): RankingRow {
  const { figures, table } = model;
  const { kind, site } = listed;
  const fields = { ...(figures.sites[site] ?? NOWHERE), contributions: contributionsOf(model, site) };
  const value = table.totals[site] ?? 0;
  if (kind === 'ranked') return { kind, rank: listed.rank, ...fields, value };
  if (kind === 'set-aside') return { kind, ...fields, reasons: reasonsOf(model, site) };
  return {
    kind,
    bestRank: listed.bestRank,
    worstRank: listed.worstRank,
    ...fields,
    value,
    bestValue: table.ceilings[site] ?? value,
    missing: fields.contributions.filter((one) => one.value === null).map((one) => one.criterionId),
  };
}

export function weighedCriteria({ figures, prepared, weights }: RankingModel): WeighedCriterion[] {
  return figures.criteria.map((criterion, j) => ({
    ...criterion,
    weight: weights[j] ?? 0,
    span: prepared.spans[j] ?? { kind: 'empty' },
  }));
}

/**
 * The ranking as the interface answers it.
 * @param most rows drawn at most, from the first; the counts are always those of all
 */
export function presentRanking(model: RankingModel, weights: WeightsOf, most = Infinity): Ranking {
  const { figures, table, state, rows } = model;
  const drawn = rows.slice(0, most).map((listed) => rowOf(model, listed));
  const count = (kind: Listed['kind']): number => rows.filter((row) => row.kind === kind).length;
  return {
    revision: figures.revision,
    weights,
    state,
    criteria: weighedCriteria(model),
    counts: { ranked: count('ranked'), incomplete: count('incomplete'), setAside: count('set-aside') },
    margin: state === 'ranked' ? table.margin : null,
    ranked: drawn.flatMap(({ kind, ...row }) => (kind === 'ranked' ? [row as RankedSite] : [])),
    incomplete: drawn.flatMap(({ kind, ...row }) => (kind === 'incomplete' ? [row as IncompleteSite] : [])),
    setAside: drawn.flatMap(({ kind, ...row }) => (kind === 'set-aside' ? [row as SetAsideSite] : [])),
  };
}

/** An answered ranking as rows, in the order it is read. */
export function rowsOf({ ranked, incomplete, setAside }: Ranking): RankingRow[] {
  return [
    ...ranked.map((row): RankingRow => ({ kind: 'ranked', ...row })),
    ...incomplete.map((row): RankingRow => ({ kind: 'incomplete', ...row })),
    ...setAside.map((row): RankingRow => ({ kind: 'set-aside', ...row })),
  ];
}

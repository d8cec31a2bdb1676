/* A what-if worked out beside the study's ranking: the one way, for the screen, the server and the tests. */
import { figureFaults } from '#core/decision/entered-figure.ts';
import { keptParticulars } from './figure.ts';
import type { RankingModel } from './ranking-model.ts';
import type { RankingCell, RankingFigures, RankingSite } from './ranking.ts';
import type { FigureParticulars } from './site.ts';
import { weighNow } from './weighing.ts';
import type { WeightStatement } from './weights.ts';
import type { WhatIfChanges } from './what-if.ts';

type TriedFigure = WhatIfChanges['figures'][number];

/** Entries of a what-if that count for nothing now: their site or criterion has gone, or takes no such figure. */
export interface Ignored {
  /** Criterion and group ids that points, an order or judgements name. */
  weights: string[];
  /** Criterion ids. */
  limits: string[];
  figures: TriedFigure[];
  /** Site ids. */
  leftOut: string[];
}

export interface AppliedWhatIf {
  figures: RankingFigures;
  statement: WeightStatement;
  ignored: Ignored;
  /** Criteria and groups that the what-if's own weights say nothing of: they came to the study after it. */
  unweighed: string[];
}

export const NO_CHANGES: WhatIfChanges = { weights: null, limits: {}, figures: [], leftOut: [] };

export const changesNothing = ({ weights, limits, figures, leftOut }: WhatIfChanges): boolean =>
  weights === null && Object.keys(limits).length === 0 && figures.length === 0 && leftOut.length === 0;

export const countIgnored = ({ weights, limits, figures, leftOut }: Ignored): number =>
  weights.length + limits.length + figures.length + leftOut.length;

/**
 * The study's figures and weights with a what-if's changes made to them. Levels taken from the candidates follow the
 * sites and figures that are left.
 * @param statement the study's; it counts where the what-if says nothing of weights
 */
export function applyWhatIf(
  figures: RankingFigures,
  statement: WeightStatement,
  changes: WhatIfChanges,
): AppliedWhatIf {
  const { figures: changed, ignored } = changedFigures(figures, changes);
  const { gone, ...weighed } = changedWeights(figures.criteria, statement, changes.weights);
  return { figures: changed, ...weighed, ignored: { ...ignored, weights: gone } };
}

/** The weights alone; `gone` are ids they name that are weighed no more. */
export function changedWeights(
  criteria: RankingFigures['criteria'],
  statement: WeightStatement,
  weights: WhatIfChanges['weights'],
): Pick<AppliedWhatIf, 'statement' | 'unweighed'> & { gone: string[] } {
  if (!weights) return { statement, unweighed: [], gone: [] };
  const weighable = new Set(criteria.flatMap(({ id, groupId }) => [id, groupId]));
  return {
    statement: weights,
    unweighed: weighNow(criteria, weights).levels.flatMap(({ unjudged }) => unjudged),
    gone: idsNamedBy(weights).filter((id) => !weighable.has(id)),
  };
}

/** Ids that a statement says something of by its own method, each once. */
export function idsNamedBy({ method, points, order, judgements }: WeightStatement): string[] {
  if (method === 'centroid') return [...new Set(order)];
  if (method === 'pairwise') return [...new Set(judgements.flatMap(([a, b]) => [a, b]))];
  return Object.keys(points);
}

/** All but the weights; apart, so that moving a weight need not value every figure anew. */
export function changedFigures(
  figures: RankingFigures,
  { limits, figures: tried, leftOut }: Omit<WhatIfChanges, 'weights'>,
): { figures: RankingFigures; ignored: Omit<Ignored, 'weights'> } {
  const siteAt = placesOf(figures.sites.map(({ siteId }) => siteId));
  const criterionAt = placesOf(figures.criteria.map(({ id }) => id));
  const enterable = (id: string): boolean =>
    ['entered', 'rating'].includes(figures.criteria[criterionAt.get(id) ?? -1]?.source ?? '');
  const out = new Set(leftOut.filter((id) => siteAt.has(id)));
  const counts = ({ siteId, criterionId }: TriedFigure): boolean =>
    siteAt.has(siteId) && enterable(criterionId);
  const limited: RankingFigures = {
    ...figures,
    criteria: figures.criteria.map((criterion) => {
      const limit = limits[criterion.id];
      return limit === undefined ? criterion : { ...criterion, limit };
    }),
  };
  const width = figures.criteria.length;
  const cellOf = ({ siteId, criterionId }: TriedFigure): number =>
    (siteAt.get(siteId) ?? 0) * width + (criterionAt.get(criterionId) ?? 0);
  const entered: Tried = new Map(tried.filter(counts).map((one) => [cellOf(one), one.value]));
  return {
    figures: without(out, replaced(limited, entered)),
    ignored: {
      limits: Object.keys(limits).filter((id) => !criterionAt.has(id)),
      figures: tried.filter((one) => !counts(one)),
      leftOut: leftOut.filter((id) => !siteAt.has(id)),
    },
  };
}

/** Tried figures by their place in the table: site × count of criteria + criterion. */
type Tried = ReadonlyMap<number, number | null>;

const placesOf = (ids: readonly string[]): Map<string, number> => new Map(ids.map((id, at) => [id, at]));

function replaced(figures: RankingFigures, tried: Tried): RankingFigures {
  if (tried.size === 0) return figures;
  const width = figures.criteria.length;
  const rows = new Set([...tried.keys()].map((at) => Math.floor(at / width)));
  return {
    ...figures,
    cells: figures.cells.map((row, site) =>
      rows.has(site) ? row.map((cell, j) => valueIn(tried, site * width + j, cell)) : row,
    ),
    notes: figures.notes.filter(([site, j]) => !tried.has(site * width + j)),
    particulars: figures.particulars.flatMap((entry): RankingFigures['particulars'] => {
      const [site, j, known] = entry;
      const value = tried.get(site * width + j);
      if (value === undefined) return [entry];
      const { kept } = heldParticulars(value, known);
      return kept ? [[site, j, kept]] : [];
    }),
  };
}

/** Null is a figure tried too: none. */
function valueIn(tried: Tried, at: number, cell: RankingCell): RankingCell {
  const value = tried.get(at);
  return value === undefined ? cell : value;
}

function without(out: ReadonlySet<string>, figures: RankingFigures): RankingFigures {
  if (out.size === 0) return figures;
  const place = new Map<number, number>();
  figures.sites.forEach(({ siteId }, at) => {
    if (!out.has(siteId)) place.set(at, place.size);
  });
  const moved = <T extends [number, number, unknown]>(entries: readonly T[]): T[] =>
    entries.flatMap((entry) => {
      const [site, ...rest] = entry;
      const now = place.get(site);
      return now === undefined ? [] : [[now, ...rest] as unknown as T];
    });
  return {
    ...figures,
    sites: figures.sites.filter((_, at) => place.has(at)),
    cells: figures.cells.filter((_, at) => place.has(at)),
    notes: moved(figures.notes),
    particulars: moved(figures.particulars),
    evidence: moved(figures.evidence),
  };
}

/**
 * What is known of a figure that still holds beside another value: a low above it or a high below it falls away; without
 * a value everything does.
 */
export function heldParticulars(
  value: number | null,
  known: FigureParticulars,
): { kept: FigureParticulars | undefined; dropped: ('low' | 'high')[] } {
  const given = (['low', 'high'] as const).filter((part) => known[part] !== undefined);
  if (value === null) return { kept: undefined, dropped: given };
  const faults = figureFaults({ low: known.low, likely: value, high: known.high }, false);
  const dropped = given.filter((part) => faults.some((fault) => fault.part === part));
  const kept = Object.fromEntries(
    Object.entries(known).filter(([part]) => !dropped.some((one) => one === part)),
  );
  return { kept: keptParticulars(kept), dropped };
}

/** Where a site stands in a ranking, or that it is not in it. */
export type Standing =
  | { kind: 'ranked'; rank: number }
  | { kind: 'incomplete'; bestRank: number; worstRank: number }
  | { kind: 'set-aside' }
  | { kind: 'left-out' };

/** The changes without the entries that count for nothing now. */
export function withoutIgnored(changes: WhatIfChanges, ignored: Ignored): WhatIfChanges {
  const { weights } = changes;
  const known = (id: string): boolean => !ignored.weights.includes(id);
  return {
    weights: weights && {
      method: weights.method,
      points: Object.fromEntries(Object.entries(weights.points).filter(([id]) => known(id))),
      order: weights.order.filter(known),
      judgements: weights.judgements.filter(([a, b]) => known(a) && known(b)),
    },
    limits: Object.fromEntries(Object.entries(changes.limits).filter(([id]) => !ignored.limits.includes(id))),
    figures: changes.figures.filter((one) => !ignored.figures.includes(one)),
    leftOut: changes.leftOut.filter((id) => !ignored.leftOut.includes(id)),
  };
}

/** A site before and after; `place` is its place in the list it is read in, from 0, null where it is left out. */
export interface RankMove extends Pick<RankingSite, 'siteId' | 'code' | 'name'> {
  before: Standing;
  after: Standing;
  beforePlace: number;
  afterPlace: number | null;
  /** Places of the list risen, negative where fallen; 0 where the site is left out. */
  risen: number;
}

/** Every site of the study's ranking, in its order, with where it stands in the what-if's. */
export function rankMoves(before: RankingModel, after: RankingModel): RankMove[] {
  const there = new Map(
    after.rows.map((listed, place) => [after.figures.sites[listed.site]?.siteId ?? '', { listed, place }]),
  );
  return before.rows.flatMap((listed, beforePlace): RankMove[] => {
    const site = before.figures.sites[listed.site];
    if (!site) return [];
    const { siteId, code, name } = site;
    const now = there.get(siteId);
    return [
      {
        siteId,
        code,
        name,
        before: standingOf(listed),
        after: now ? standingOf(now.listed) : { kind: 'left-out' },
        beforePlace,
        afterPlace: now?.place ?? null,
        risen: now ? beforePlace - now.place : 0,
      },
    ];
  });
}

const standingOf = ({ site: _site, ...standing }: RankingModel['rows'][number]): Standing => standing;

/** Whether a site stands elsewhere than before: another rank, or another kind of standing. */
export const hasMoved = ({ before, after }: RankMove): boolean =>
  JSON.stringify(before) !== JSON.stringify(after);

const FIRST_MOVES = 12;
const MOST_MOVED = 6;

/** The moves worth drawing of a long list: the first twelve of either ranking, and the six others that moved most. */
export function shownMoves(moves: readonly RankMove[]): RankMove[] {
  const first = (place: number | null): boolean => place !== null && place < FIRST_MOVES;
  const isFirst = (move: RankMove): boolean => first(move.beforePlace) || first(move.afterPlace);
  const movedMost = moves
    .filter((move) => !isFirst(move) && hasMoved(move))
    .sort((a, b) => reach(b) - reach(a))
    .slice(0, MOST_MOVED);
  const shown = new Set(movedMost);
  return moves.filter((move) => isFirst(move) || shown.has(move));
}

/** A site that enters or leaves the list moves further than any that stays on it. */
const reach = ({ risen, afterPlace }: RankMove): number => (afterPlace === null ? Infinity : Math.abs(risen));

import { Criterion } from './criterion.ts';
import { FigureParticulars } from './site.ts';
import { WeightsOf, type Weights } from './weights.ts';
import { z } from './zod.ts';

/** A figure: a number, null where nobody has entered one, or "worst" where an orbit is out of reach or falls short. */
export const RankingCell = z.union([z.number(), z.null(), z.literal('worst')]);
export type RankingCell = z.infer<typeof RankingCell>;

const siteFields = {
  siteId: z.uuid(),
  code: z.string(),
  name: z.string(),
  latitudeDeg: z.number(),
  longitudeDeg: z.number(),
};

export const RankingSite = z.object(siteFields).meta({ id: 'RankingSite' });
export type RankingSite = z.infer<typeof RankingSite>;

/** Figures of every site under every weighed criterion: what a ranking under any weights follows from. */
export const RankingFigures = z
  .object({
    revision: z.int(),
    criteria: z.array(Criterion),
    sites: z.array(RankingSite),
    /** A row a site, a cell a criterion, in the criteria's units. */
    cells: z.array(z.array(RankingCell)),
    /** Words for cells that need them: site's place, criterion's place, words. */
    notes: z.array(z.tuple([z.int(), z.int(), z.string()])),
    /** What is known of entered figures: site's place, criterion's place, low, high, source, date, confidence. */
    particulars: z.array(z.tuple([z.int(), z.int(), FigureParticulars])),
    /** Figures with evidence files: site's place, criterion's place, how many. */
    evidence: z.array(z.tuple([z.int(), z.int(), z.int()])),
  })
  .meta({ id: 'RankingFigures' });
export type RankingFigures = z.infer<typeof RankingFigures>;

export const RankingQuery = z.object({
  weights: WeightsOf.default('study'),
  form: z.enum(['ranking', 'figures']).default('ranking'),
});

const Contribution = z
  .object({
    criterionId: z.uuid(),
    /** In the criterion's unit; null where there is none. */
    figure: z.number().nullable(),
    /** 0 to 1; null where the figure is missing. */
    value: z.number().nullable(),
    weight: z.number(),
    /** Weight × value; null where the figure is missing. */
    term: z.number().nullable(),
    /** Why the figure counts as it does, where that needs saying. */
    note: z.string().nullable(),
  })
  .meta({ id: 'Contribution' });
export type Contribution = z.infer<typeof Contribution>;

const rowFields = { ...siteFields, contributions: z.array(Contribution) };

export const RankedSite = z
  .object({ rank: z.int(), ...rowFields, value: z.number() })
  .meta({ id: 'RankedSite' });
export type RankedSite = z.infer<typeof RankedSite>;

/** A site that misses a figure: its value and rank lie in a range, counted against the ranked sites alone. */
export const IncompleteSite = z
  .object({
    bestRank: z.int(),
    worstRank: z.int(),
    ...rowFields,
    /** With every missing value at 0, and at 1. */
    value: z.number(),
    bestValue: z.number(),
    /** Criteria the site has no figure for. */
    missing: z.array(z.uuid()),
  })
  .meta({ id: 'IncompleteSite' });
export type IncompleteSite = z.infer<typeof IncompleteSite>;

export const SetAsideSite = z
  .object({
    ...rowFields,
    /** The limits it fails, each in words. */
    reasons: z.array(z.object({ criterionId: z.uuid(), message: z.string() })),
  })
  .meta({ id: 'SetAsideSite' });
export type SetAsideSite = z.infer<typeof SetAsideSite>;

/** Why there are ranks, or none. */
export const RankingState = z.enum(['ranked', 'no-sites', 'no-criteria', 'no-weights']);
export type RankingState = z.infer<typeof RankingState>;

/** What a criterion's value runs between; `flat` where all candidates are equal and its value is 0 for all. */
export const RankingSpan = z.union([
  z.object({ kind: z.literal('span'), worst: z.number(), best: z.number() }),
  z.object({ kind: z.literal('flat'), figure: z.number() }),
  z.object({ kind: z.literal('empty') }),
]);

export const WeighedCriterion = Criterion.extend({ weight: z.number(), span: RankingSpan }).meta({
  id: 'WeighedCriterion',
});
export type WeighedCriterion = z.infer<typeof WeighedCriterion>;

export const Ranking = z
  .object({
    /** The study's revision the figures belong to. */
    revision: z.int(),
    weights: WeightsOf,
    state: RankingState,
    criteria: z.array(WeighedCriterion),
    counts: z.object({ ranked: z.int(), incomplete: z.int(), setAside: z.int() }),
    /** The first ranked site's lead over the second; null with fewer than two. */
    margin: z.number().nullable(),
    ranked: z.array(RankedSite),
    incomplete: z.array(IncompleteSite),
    setAside: z.array(SetAsideSite),
  })
  .meta({ id: 'Ranking' });
export type Ranking = z.infer<typeof Ranking>;

/** What the screens start from before their own reading arrives. */
export interface RankingStart {
  ranking: Ranking;
  study: Weights;
  mine: Weights;
}

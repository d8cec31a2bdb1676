/* Does the ranking hold? What GET …/sensitivity answers; src/contract/sensitivity-model.ts works it out. */
import { DEFAULT_SAMPLES } from './decide.ts';
import { RankingState } from './ranking.ts';
import { WeightsOf } from './weights.ts';
import { z } from './zod.ts';

/** Which weights are drawn: within a band about those in force, any at all, or any that keep their order. */
export const WeightModelKind = z.enum(['band', 'simplex', 'order']);
export type WeightModelKind = z.infer<typeof WeightModelKind>;

export const DEFAULT_BAND = 0.5;
export const DEFAULT_SEED = 1;
/** Draws of one analysis: a phone makes as many in some seconds. */
export const MOST_DRAWS = 100_000;
/** Sites of one analysis, best ranked first: there is a rank for each, and a pair of any two. */
export const MOST_DRAWN_SITES = 100;

const SAMPLES = `Samples run from 1 to ${MOST_DRAWS.toLocaleString('en')}.`;
const BAND = 'A band lies between 0 and 1.';
const SEED = 'A seed is a whole number from 0 to 9,007,199,254,740,991.';

/** How weights and figures are drawn. */
export const DrawQuery = z.object({
  model: WeightModelKind.default('band').meta({
    description:
      'Weights uniform within ± band × each weight; on the whole simplex; or in the order of those in force',
  }),
  band: z.coerce.number(BAND).min(0, BAND).max(1, BAND).default(DEFAULT_BAND),
  samples: z.coerce
    .number(SAMPLES)
    .int(SAMPLES)
    .min(1, SAMPLES)
    .max(MOST_DRAWS, SAMPLES)
    .default(DEFAULT_SAMPLES),
  seed: z.coerce
    .number(SEED)
    .int(SEED)
    .min(0, SEED)
    .max(Number.MAX_SAFE_INTEGER, SEED)
    .default(DEFAULT_SEED)
    .meta({
      description: 'The same seed gives the same answer to the last digit, on any machine',
    }),
});
export type DrawQuery = z.infer<typeof DrawQuery>;

export const SensitivityQuery = DrawQuery.extend({ weights: WeightsOf.default('study') });
export type SensitivityQuery = z.infer<typeof SensitivityQuery>;

const siteId = z.uuid();
const criterionId = z.uuid();

/** The weight at which the lead changes while the others keep their proportions, and who takes or joins it. */
const LeadChange = z.object({ weight: z.number(), siteId }).meta({ id: 'SensitivityLeadChange' });

export const LeaderChangeOf = z
  .object({
    criterionId,
    /** The weight in force. */
    weight: z.number(),
    below: LeadChange.nullable(),
    above: LeadChange.nullable(),
  })
  .meta({ id: 'LeaderChangeOf' });
export type LeaderChangeOf = z.infer<typeof LeaderChangeOf>;

/** One uncertain figure moved alone: the leader's margin with it at its low and at its high. */
export const TornadoBarOf = z
  .object({
    siteId,
    criterionId,
    /** In the criterion's unit. */
    low: z.number(),
    likely: z.number(),
    high: z.number(),
    /** Overall value; below 0 the lead is lost. */
    atLow: z.number(),
    atHigh: z.number(),
  })
  .meta({ id: 'TornadoBarOf' });
export type TornadoBarOf = z.infer<typeof TornadoBarOf>;

export const TornadoOf = z
  .object({ margin: z.number(), bars: z.array(TornadoBarOf) })
  .meta({ id: 'TornadoOf', description: 'Widest first' });
export type TornadoOf = z.infer<typeof TornadoOf>;

/** Closeness to the ideal and the rank it gives, best first. */
export const SecondOpinion = z
  .array(z.object({ siteId, closeness: z.number(), rank: z.int() }))
  .meta({ id: 'SecondOpinion' });
export type SecondOpinion = z.infer<typeof SecondOpinion>;

export const Dominance = z
  .object({
    /** Sites that no other is at least as good as on every criterion and better on one. */
    nonDominated: z.int(),
    dominated: z.array(z.object({ siteId, by: siteId })),
  })
  .meta({ id: 'Dominance' });
export type Dominance = z.infer<typeof Dominance>;

export const SiteAcceptability = z
  .object({
    siteId,
    /** Share of draws at rank 1, 2, …, and the standard error of each. */
    shares: z.array(z.number()),
    errors: z.array(z.number()),
    /** Mean weights under which the site leads, by criterion id; null where it never does. */
    centralWeights: z.record(criterionId, z.number()).nullable(),
    /** Share of draws of the figures in which it leads under its central weights, and its standard error. */
    confidence: z.number().nullable(),
    confidenceError: z.number().nullable(),
    /** Share of draws in which it stands above each site, in the order of the sites; null for itself. */
    wins: z.array(z.number().nullable()),
  })
  .meta({ id: 'SiteAcceptability' });
export type SiteAcceptability = z.infer<typeof SiteAcceptability>;

export const AcceptabilityOf = z
  .object({
    model: WeightModelKind,
    /** Of the band alone. */
    band: z.number().nullable(),
    /** Ids of the criteria, the most important first; of the order alone. */
    order: z.array(criterionId).nullable(),
    samples: z.int(),
    seed: z.int(),
    uncertainFigures: z.int(),
    /** Ranked sites beyond the best hundred, which are not drawn. */
    sitesLeftOut: z.int(),
    sites: z.array(SiteAcceptability),
  })
  .meta({ id: 'AcceptabilityOf' });
export type AcceptabilityOf = z.infer<typeof AcceptabilityOf>;

export const Sensitivity = z
  .object({
    revision: z.int(),
    weights: WeightsOf,
    state: RankingState,
    /** Ranked sites, best first; the others play no part. */
    sites: z.array(
      z.object({ siteId, code: z.string(), name: z.string(), rank: z.int(), value: z.number() }),
    ),
    criteria: z.array(z.object({ criterionId, name: z.string(), weight: z.number() })),
    /** Criteria without weight for which a ranked site has no figure: they play no part. */
    criteriaLeftOut: z.array(criterionId),
    /** These are null where fewer than two sites are ranked. */
    leaderChanges: z.array(LeaderChangeOf).nullable(),
    tornado: TornadoOf.nullable(),
    topsis: SecondOpinion.nullable(),
    dominance: Dominance.nullable(),
    acceptability: AcceptabilityOf.nullable(),
  })
  .meta({ id: 'Sensitivity' });
export type Sensitivity = z.infer<typeof Sensitivity>;

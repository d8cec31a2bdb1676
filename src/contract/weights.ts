import { MOST_POINTS } from './points.ts';
import { z } from './zod.ts';

/** Whose weights: the study's, which a lead sets and everyone sees, or the member's own. */
export const WeightsOf = z.enum(['study', 'mine']);
export type WeightsOf = z.infer<typeof WeightsOf>;

export const WeightsQuery = z.object({ weights: WeightsOf.default('study') });

export const WeightMethod = z.enum(['points', 'swing', 'pairwise', 'centroid']);
export type WeightMethod = z.infer<typeof WeightMethod>;

/** Points by criterion id and group id; one without any has 0. */
const Points = z.record(
  z.uuid(),
  z
    .number('Enter a number.')
    .min(0, `Points run from 0 to ${MOST_POINTS}.`)
    .max(MOST_POINTS, `Points run from 0 to ${MOST_POINTS}.`),
);

const LEAST_RATIO = 1 / 9;
const MOST_RATIO = 9;
const RATIO = 'A judgement lies between 1/9 and 9.';
const Judgement = z.tuple([
  z.uuid(),
  z.uuid(),
  z
    .number(RATIO)
    .min(LEAST_RATIO - 1e-12, RATIO)
    .max(MOST_RATIO, RATIO),
]);

const statement = {
  method: WeightMethod,
  points: Points.meta({ description: 'Points and swing: by criterion id, and by group id for groups' }),
  order: z.array(z.uuid()).meta({
    description: 'Rank-order centroid: ids of criteria and groups, the most important first',
  }),
  judgements: z.array(Judgement).max(2_000).meta({
    description: 'Pairwise: [a, b, how many times a outweighs b]; every pair of a level once',
  }),
};

/** How weights were said, by one of the four methods; the weights follow from it. */
export const WeightStatement = z.object(statement).meta({ id: 'WeightStatement' });
export type WeightStatement = z.infer<typeof WeightStatement>;

/** The statement that says nothing but points. */
export const pointsStatement = (points: Readonly<Record<string, number>>): WeightStatement => ({
  method: 'points',
  points: { ...points },
  order: [],
  judgements: [],
});

const Person = z.object({ userId: z.string(), name: z.string() });

/** The lead who set or chose them; sets of before this was kept have none. */
const by = Person.optional();

/** Where the study's weights come from: set apart, one member's own, or the mean of several. */
export const WeightOrigin = z
  .discriminatedUnion('kind', [
    z.object({ kind: z.literal('apart'), by }),
    z.object({ kind: z.literal('member'), ...Person.shape, by }),
    z.object({ kind: z.literal('mean'), members: z.array(Person), by }),
  ])
  .meta({ id: 'WeightOrigin' });
export type WeightOrigin = z.infer<typeof WeightOrigin>;

/** Items weighed against each other: the criteria of a group, or groups and single criteria at the top. */
export const WeightLevel = z
  .object({
    groupId: z.uuid().nullable(),
    ids: z.array(z.uuid()),
    /** By id, summing to 1; null where nothing is said yet. */
    weights: z.record(z.uuid(), z.number()).nullable(),
    /** Ids the statement says nothing of; they have no weight yet. */
    unjudged: z.array(z.uuid()),
    /** Pairwise alone, from three items on. */
    consistency: z
      .object({
        lambdaMax: z.number(),
        index: z.number(),
        ratio: z.number().nullable(),
        /** The judgement that disagrees most, and what the others imply for it. */
        worst: z.tuple([z.uuid(), z.uuid()]),
        implied: z.number(),
      })
      .nullable(),
  })
  .meta({ id: 'WeightLevel' });
export type WeightLevel = z.infer<typeof WeightLevel>;

export const Weights = z
  .object({
    weights: WeightsOf,
    ...statement,
    /** The weight of each criterion, summing to 1; null where nothing is said yet. */
    shares: z.record(z.uuid(), z.number()).nullable(),
    levels: z.array(WeightLevel),
    /** A member's own: whether the study's members may see it. */
    shared: z.boolean(),
    /** The study's: where it comes from, and why; null and empty for a member's own. */
    origin: WeightOrigin.nullable(),
    reason: z.string(),
    /** 0 where the set has never been saved: then a member's own starts from the study's. */
    version: z.int(),
  })
  .meta({ id: 'Weights' });
export type Weights = z.infer<typeof Weights>;

const reason = z.string().trim().max(2_000, 'A reason has up to 2,000 characters.');

/**
 * A set written whole. Left-out `shared` and `reason` stay as they are, but the study's reason falls away with the
 * choice it was written for.
 */
export const WeightsInput = z
  .strictObject({
    method: WeightMethod.default('points'),
    points: Points.default({}),
    order: statement.order.default([]),
    judgements: statement.judgements.default([]),
    shared: z.boolean().optional(),
    reason: reason.optional(),
    version: z.int().min(0).optional(),
  })
  .meta({ id: 'WeightsInput' });
export type WeightsInput = z.infer<typeof WeightsInput>;
export type WeightsDraft = z.input<typeof WeightsInput>;

/** The lead's choice of the study's weights: a member's shared set, or the mean of all shared ones. */
export const WeightsChoice = z
  .strictObject({
    from: z.discriminatedUnion('kind', [
      z.strictObject({ kind: z.literal('member'), userId: z.string() }),
      z.strictObject({ kind: z.literal('mean') }),
    ]),
    reason: reason.min(1, 'Write the reason for the choice.'),
    version: z.int().min(0).optional(),
  })
  .meta({ id: 'WeightsChoice' });
export type WeightsChoice = z.infer<typeof WeightsChoice>;

/** One member who may weigh, with their set where it is shared or their own. */
export const MemberWeights = z
  .object({
    ...Person.shape,
    role: z.enum(['lead', 'engineer', 'reviewer']),
    mine: z.boolean(),
    /** `none`: no set yet. `kept`: a set that is not shared. */
    state: z.enum(['none', 'kept', 'shared']),
    /** Null where there is none to be seen. */
    set: z
      .object({
        ...statement,
        shares: z.record(z.uuid(), z.number()).nullable(),
        updatedAt: z.iso.datetime(),
      })
      .nullable(),
  })
  .meta({ id: 'MemberWeights' });
export type MemberWeights = z.infer<typeof MemberWeights>;
export const MemberWeightsList = z.object({ items: z.array(MemberWeights), total: z.int() });
export type MemberWeightsList = z.infer<typeof MemberWeightsList>;

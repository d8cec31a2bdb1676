import { areKnots, MOST_KNOTS } from '#core/decision/shape.ts';
import { levelledOf } from './value-function.ts';
import { z } from './zod.ts';

export const MOST_CRITERIA = 100;
export const MOST_ALTERNATIVES = 2_000;
export const MOST_SAMPLES = 1_000_000;
/** Samples × alternatives × criteria of one call. */
export const MOST_DRAWN = 500_000_000;
export const DEFAULT_SAMPLES = 10_000;
const WEIGHT_SUM_TOLERANCE = 1e-9;
/** Beyond this differences of figures overflow. */
const GREATEST = 1e300;

const Code = z.string().min(1).max(40).meta({ description: '1 to 40 characters, unique in its list' });
const Figure = z
  .number()
  .min(-GREATEST, 'A figure lies between −1e300 and 1e300.')
  .max(GREATEST, 'A figure lies between −1e300 and 1e300.');

type Complain = (path: PropertyKey[], message: string) => void;

const complainTo =
  (ctx: z.core.ParsePayload): Complain =>
  (path, message) => {
    ctx.issues.push({ code: 'custom', input: ctx.value, path, message });
  };

const decideCriterion = z.strictObject({
  code: Code,
  worst: Figure.optional().meta({ description: 'The level of value 0, in the unit of the figures' }),
  best: Figure.optional().meta({ description: 'The level of value 1; worst and best go together' }),
  curvature: z
    .number()
    .min(-1000, 'A curvature lies between −1,000 and 1,000.')
    .max(1000, 'A curvature lies between −1,000 and 1,000.')
    .optional()
    .meta({ description: 'c of (1 − e^(−c s))/(1 − e^(−c)); left out or 0: straight' }),
  points: z
    .array(z.tuple([Figure, z.number()]))
    .max(MOST_KNOTS, `A value function has up to ${MOST_KNOTS} points.`)
    .optional()
    .meta({
      description:
        'In place of worst, best and curvature: two to five [figure, value], straight between; the figures all rise or all fall, the values run from 0 at one end to 1 at the other and never turn',
    }),
});

function checkPoints(ctx: z.core.ParsePayload<z.infer<typeof decideCriterion>>, complain: Complain): void {
  for (const key of ['worst', 'best', 'curvature'] as const) {
    if (ctx.value[key] !== undefined) complain([key], 'Points stand in place of this.');
  }
  const { shape } = levelledOf(ctx.value);
  if (shape.kind === 'piecewise' && !areKnots(shape.knots))
    complain(
      ['points'],
      'Figures all rise or all fall; values run from 0 at one end to 1 at the other and never turn.',
    );
}

/** A criterion with its value function: worst and best, bent by a curvature if there is one, or points. */
export const DecideCriterion = decideCriterion
  .check((ctx) => {
    const complain = complainTo(ctx);
    const { worst, best, points } = ctx.value;
    if (points) return checkPoints(ctx, complain);
    if (worst === undefined) complain(['worst'], 'This is needed, or points.');
    if (best === undefined) complain(['best'], 'This is needed, or points.');
    if (worst !== undefined && best !== undefined && worst / 2 === best / 2)
      complain(['best'], 'The best level differs from the worst.');
  })
  .meta({ id: 'DecideCriterion' });
export type DecideCriterion = z.infer<typeof DecideCriterion>;

const UncertainFigure = z
  .strictObject({ low: Figure, likely: Figure, high: Figure })
  .refine(({ low, likely, high }) => low <= likely && likely <= high, {
    error: 'Low is at most likely, and likely at most high.',
  })
  .meta({ id: 'UncertainFigure' });

/** A number, or what is known of it. */
export const DecideFigure = z.union([Figure, UncertainFigure], {
  error: 'A number, or low, likely and high in rising order.',
});
export type DecideFigure = z.infer<typeof DecideFigure>;

export const DecideAlternative = z
  .strictObject({
    code: Code,
    figures: z
      .record(z.string(), DecideFigure)
      .meta({ description: 'By criterion, one for each; likely counts where one figure is wanted' }),
  })
  .meta({ id: 'DecideAlternative' });
export type DecideAlternative = z.infer<typeof DecideAlternative>;

const WeightModel = z.union(
  [
    z.literal('simplex'),
    z.strictObject({
      band: z.number().min(0, 'A band lies between 0 and 1.').max(1, 'A band lies between 0 and 1.'),
    }),
    z.strictObject({ order: z.array(Code) }),
  ],
  { error: '"simplex", { "band": 0 to 1 } or { "order": [every criterion] }.' },
);

const AcceptabilityInput = z
  .strictObject({
    samples: z
      .int()
      .min(1, 'A sample is needed.')
      .max(MOST_SAMPLES, `Up to ${MOST_SAMPLES.toLocaleString('en')} samples.`)
      .default(DEFAULT_SAMPLES),
    seed: z.int().min(0, 'A seed is a whole number from 0.').meta({
      description: 'The same seed gives the same answer to the last digit, on any machine',
    }),
    weights: WeightModel.meta({
      description:
        'Weights uniform on the whole simplex; within ± a share of each weight; or falling along an order of all criteria',
    }),
  })
  .meta({ id: 'AcceptabilityInput' });

const decideObject = z.strictObject({
  criteria: z
    .array(DecideCriterion)
    .min(1, 'A criterion is needed.')
    .max(MOST_CRITERIA, `Up to ${MOST_CRITERIA} criteria.`),
  weights: z
    .record(z.string(), z.number().min(0, 'A weight is not negative.'))
    .meta({ description: 'By criterion, one for each, summing to 1' }),
  alternatives: z
    .array(DecideAlternative)
    .min(1, 'An alternative is needed.')
    .max(MOST_ALTERNATIVES, `Up to ${MOST_ALTERNATIVES.toLocaleString('en')} alternatives.`),
  acceptability: AcceptabilityInput.optional(),
});
type DecideObject = z.infer<typeof decideObject>;

function checkUnique(list: readonly { code: string }[], key: string, complain: Complain): void {
  const seen = new Set<string>();
  list.forEach(({ code }, at) => {
    if (seen.size === seen.add(code).size) complain([key, at, 'code'], 'A code appears once in its list.');
  });
}

/** A record has a key for every criterion and no other. */
function checkKeys(
  codes: ReadonlySet<string>,
  record: Readonly<Record<string, unknown>>,
  path: PropertyKey[],
  complain: Complain,
): void {
  for (const code of codes) {
    if (!Object.hasOwn(record, code)) complain([...path, code], 'This is needed.');
  }
  for (const key of Object.keys(record)) {
    if (!codes.has(key)) complain([...path, key], 'There is no such criterion.');
  }
}

function checkAcceptability(
  { criteria, alternatives, acceptability }: DecideObject,
  complain: Complain,
): void {
  if (!acceptability) return;
  const { samples, weights } = acceptability;
  if (samples * alternatives.length * criteria.length > MOST_DRAWN)
    complain(
      ['acceptability', 'samples'],
      `A call draws up to ${MOST_DRAWN.toLocaleString('en')} figures: samples × alternatives × criteria.`,
    );
  if (typeof weights === 'string' || 'band' in weights) return;
  const codes = new Set(criteria.map(({ code }) => code));
  const named = new Set(weights.order);
  if (
    named.size !== codes.size ||
    weights.order.length !== codes.size ||
    weights.order.some((c) => !codes.has(c))
  )
    complain(['acceptability', 'weights', 'order'], 'The order names every criterion once.');
}

/** POST /api/v1/decide: criteria, weights and alternatives in. */
export const DecideInput = decideObject
  .check((ctx) => {
    const { criteria, weights, alternatives } = ctx.value;
    const complain = complainTo(ctx);
    checkUnique(criteria, 'criteria', complain);
    checkUnique(alternatives, 'alternatives', complain);
    const codes = new Set(criteria.map(({ code }) => code));
    checkKeys(codes, weights, ['weights'], complain);
    const sum = Object.values(weights).reduce((total, w) => total + w, 0);
    if (Math.abs(sum - 1) > WEIGHT_SUM_TOLERANCE) complain(['weights'], `Weights sum to 1, these to ${sum}.`);
    alternatives.forEach(({ figures }, at) =>
      checkKeys(codes, figures, ['alternatives', at, 'figures'], complain),
    );
    checkAcceptability(ctx.value, complain);
  })
  .meta({ id: 'DecideInput' });
export type DecideInput = z.infer<typeof DecideInput>;

const byCriterion = z.record(z.string(), z.number());
const byAlternative = <T extends z.ZodType>(entry: T) => z.record(z.string(), entry);
const Change = z
  .strictObject({ weight: z.number(), leader: z.string() })
  .meta({ id: 'LeadChange', description: 'The weight at which the lead changes, and to whom' });

/** The answer of a decision; alternatives in `ranking` and `topsis` stand best first. */
export const DecideOutput = z
  .strictObject({
    ranking: z.array(
      z.strictObject({ code: z.string(), rank: z.int(), value: z.number(), terms: byCriterion }),
    ),
    topsis: z.array(z.strictObject({ code: z.string(), closeness: z.number() })).nullable(),
    dominatedBy: byAlternative(z.array(z.string())).nullable(),
    leaderChange: z
      .array(z.strictObject({ criterion: z.string(), below: Change.nullable(), above: Change.nullable() }))
      .nullable(),
    acceptability: z
      .strictObject({
        shares: byAlternative(z.array(z.number())).meta({ description: 'Share of draws at rank 1, 2, …' }),
        centralWeights: byAlternative(byCriterion.nullable()),
        confidence: byAlternative(z.number().nullable()),
      })
      .nullable()
      .meta({ description: 'Null where it was not asked for' }),
  })
  .meta({
    id: 'DecideOutput',
    description: 'Parts that compare alternatives are null where there is only one',
  });
export type DecideOutput = z.infer<typeof DecideOutput>;

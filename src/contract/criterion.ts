import { listOf } from './list.ts';
import { z } from './zod.ts';
import { areKnots, MOST_KNOTS } from '#core/decision/shape.ts';
import { QUANTITIES, QUANTITY_KEYS } from './quantity.ts';

const finite = z.number('Enter a number.');

/** Levels between which the value runs from 0 to 1, in the criterion's unit. */
export const CriterionLevels = z
  .discriminatedUnion('mode', [
    z.strictObject({ mode: z.literal('candidates') }),
    z.strictObject({ mode: z.literal('fixed'), worst: finite, best: finite }),
  ])
  .meta({ id: 'CriterionLevels' });
export type CriterionLevels = z.infer<typeof CriterionLevels>;

/** A must-meet limit, in the criterion's unit. */
export const CriterionLimit = z
  .strictObject({ kind: z.enum(['at-least', 'at-most']), value: finite })
  .meta({ id: 'CriterionLimit' });
export type CriterionLimit = z.infer<typeof CriterionLimit>;

export const MOST_CURVATURE = 20;
const CURVATURE = `A curvature lies between −${MOST_CURVATURE} and ${MOST_CURVATURE}.`;

/** How value grows from the worst level to the best; a knot is [position from worst 0 to best 1, value 0 to 1]. */
export const CriterionShape = z
  .discriminatedUnion('kind', [
    z.strictObject({ kind: z.literal('straight') }),
    z.strictObject({
      kind: z.literal('exponential'),
      curvature: finite.min(-MOST_CURVATURE, CURVATURE).max(MOST_CURVATURE, CURVATURE),
    }),
    z.strictObject({
      kind: z.literal('piecewise'),
      knots: z
        .array(z.tuple([finite, finite]))
        .max(MOST_KNOTS, `A value function has up to ${MOST_KNOTS} points.`)
        .refine(
          (knots) => areKnots(knots),
          'Points run from (0, 0) to (1, 1), each beyond the one before and none falling.',
        ),
    }),
  ])
  .meta({ id: 'CriterionShape' });
export type CriterionShape = z.infer<typeof CriterionShape>;

/** A rating has five named steps, 0 to 4. */
export const RATING_STEPS = 5;
export const DEFAULT_STEPS = ['Very poor', 'Poor', 'Fair', 'Good', 'Very good'];
const steps = z
  .array(z.string().trim().min(1, 'Name every step.').max(60, 'A step’s name has up to 60 characters.'))
  .length(RATING_STEPS, 'A rating has five steps.')
  .check((ctx) => {
    const names = ctx.value.map((name) => name.toLowerCase());
    names.forEach((name, step) => {
      const first = names.indexOf(name);
      if (first === step) return;
      const message = `Step ${first} has this name already.`;
      ctx.issues.push({ code: 'custom', message, path: [step], input: ctx.value });
    });
  });

const name = z
  .string()
  .trim()
  .min(1, 'Give the criterion a name.')
  .max(80, 'A name has up to 80 characters.');
const unit = z.string().trim().max(20, 'A unit has up to 20 characters.');
const direction = z.enum(['more', 'less']);

export const Criterion = z
  .object({
    id: z.uuid(),
    /** From 0, in the order shown. */
    position: z.int(),
    name: z.string(),
    unit: z.string(),
    direction,
    /** A text criterion is shown with the sites and never weighed. */
    source: z.enum(['computed', 'entered', 'rating', 'text']),
    quantity: z.enum(QUANTITY_KEYS).nullable(),
    /** The orbit a computed criterion is for; null for the whole manifest. */
    orbitId: z.uuid().nullable(),
    levels: CriterionLevels,
    shape: CriterionShape,
    /** The group it is weighed in; null where it stands by itself. */
    groupId: z.uuid().nullable(),
    /** Names of a rating's steps 0 to 4; null where it is no rating. */
    steps: z.array(z.string()).nullable(),
    limit: CriterionLimit.nullable(),
    version: z.int(),
  })
  .meta({ id: 'Criterion' });
export type Criterion = z.infer<typeof Criterion>;

/** What may be asked of levels and direction together; used by the forms and by the server after a patch is applied. */
export function levelFault(direction: 'more' | 'less', levels: CriterionLevels): string | null {
  if (levels.mode === 'candidates') return null;
  if (levels.worst === levels.best) return 'The worst and the best level must differ.';
  const climbs = levels.best > levels.worst;
  if (climbs === (direction === 'more')) return null;
  return direction === 'more'
    ? 'More is better here, so the best level must be the greater one.'
    : 'Less is better here, so the best level must be the smaller one.';
}

interface Levelled {
  direction?: Criterion['direction'] | undefined;
  levels?: CriterionLevels | undefined;
}
const refuseLevels = (ctx: z.core.ParsePayload, { direction: way, levels }: Levelled): void => {
  const fault = way && levels ? levelFault(way, levels) : null;
  if (fault) ctx.issues.push({ code: 'custom', message: fault, path: ['levels', 'best'], input: levels });
};
const levelsFit = (ctx: z.core.ParsePayload<Levelled>): void => {
  refuseLevels(ctx, ctx.value);
};

const settings = {
  levels: CriterionLevels.default({ mode: 'candidates' }),
  shape: CriterionShape.default({ kind: 'straight' }),
  groupId: z.uuid().nullable().default(null),
  limit: CriterionLimit.nullable().default(null),
};

export const ComputedInput = z
  .strictObject({
    source: z.literal('computed'),
    quantity: z.enum(QUANTITY_KEYS),
    orbitId: z.uuid().nullable().default(null),
    /** Left out: named after the quantity and the orbit. */
    name: name.optional(),
    direction: direction.optional(),
    ...settings,
  })
  .check((ctx) => {
    const { quantity, orbitId } = ctx.value;
    const { scope } = QUANTITIES[quantity];
    if (scope === 'either' || (scope === 'orbit') === (orbitId !== null)) return;
    const message =
      scope === 'orbit' ? 'Choose the orbit it is for.' : 'It is for the whole manifest, not one orbit.';
    ctx.issues.push({ code: 'custom', message, path: ['orbitId'], input: orbitId });
  })
  .check((ctx) => {
    const { direction: way, quantity, levels } = ctx.value;
    refuseLevels(ctx, { direction: way ?? QUANTITIES[quantity].direction, levels });
  });

export const EnteredInput = z
  .strictObject({ source: z.enum(['entered', 'text']), name, unit: unit.default(''), direction, ...settings })
  .check(levelsFit);

export const RatingInput = z
  .strictObject({
    source: z.literal('rating'),
    name,
    direction: direction.default('more'),
    steps: steps.default(DEFAULT_STEPS),
    ...settings,
    levels: CriterionLevels.optional().meta({
      description: 'Left out: fixed at the first and the last step',
    }),
  })
  .check(levelsFit);

export const CriterionInput = z
  .discriminatedUnion('source', [ComputedInput, EnteredInput, RatingInput])
  .meta({ id: 'CriterionInput' });
export type CriterionInput = z.output<typeof CriterionInput>;
export type CriterionDraft = z.input<typeof CriterionInput>;

/** The levels of a new criterion; a rating without any runs over all its steps, the way it is better. */
export function levelsOf({ levels, direction: way }: CriterionInput): CriterionLevels {
  const last = RATING_STEPS - 1;
  return (
    levels ?? { mode: 'fixed', ...(way === 'less' ? { worst: last, best: 0 } : { worst: 0, best: last }) }
  );
}

/** Only what is sent changes. `position` moves the criterion there and the others round it. */
export const CriterionPatch = z
  .strictObject({
    name: name.optional(),
    unit: unit.optional(),
    direction: direction.optional(),
    source: z.enum(['entered', 'text']).optional(),
    levels: CriterionLevels.optional(),
    shape: CriterionShape.optional(),
    groupId: z.uuid().nullable().optional(),
    steps: steps.optional(),
    limit: CriterionLimit.nullable().optional(),
    position: z.int().min(0).optional(),
    version: z.int().optional(),
  })
  .check(levelsFit)
  .meta({ id: 'CriterionPatch' });
export type CriterionPatch = z.infer<typeof CriterionPatch>;

export const CriterionList = listOf(Criterion);
export type CriterionList = z.infer<typeof CriterionList>;

export const CriterionGroup = z
  .object({ id: z.uuid(), name: z.string(), version: z.int() })
  .meta({ id: 'CriterionGroup' });
export type CriterionGroup = z.infer<typeof CriterionGroup>;

export const CriterionGroupInput = z.strictObject({ name }).meta({ id: 'CriterionGroupInput' });
export const CriterionGroupPatch = z
  .strictObject({ name, version: z.int().optional() })
  .meta({ id: 'CriterionGroupPatch' });
export const CriterionGroupList = listOf(CriterionGroup);
export type CriterionGroupList = z.infer<typeof CriterionGroupList>;

import { MOST_POINTS } from './points.ts';
import { z } from './zod.ts';

/** Whose weights: the study's, which a lead sets and everyone sees, or the member's own. */
export const WeightsOf = z.enum(['study', 'mine']);
export type WeightsOf = z.infer<typeof WeightsOf>;

export const WeightsQuery = z.object({ weights: WeightsOf.default('study') });

/** Points by criterion id; a criterion without any has 0. */
const Points = z.record(
  z.uuid(),
  z
    .number('Enter a number.')
    .min(0, `Points run from 0 to ${MOST_POINTS}.`)
    .max(MOST_POINTS, `Points run from 0 to ${MOST_POINTS}.`),
);

export const Weights = z
  .object({
    weights: WeightsOf,
    points: Points,
    /** Points over their sum; null where every criterion has 0 points. */
    shares: z.record(z.uuid(), z.number()).nullable(),
    /** 0 where the set has never been saved: then a member's own starts from the study's. */
    version: z.int(),
  })
  .meta({ id: 'Weights' });
export type Weights = z.infer<typeof Weights>;

export const WeightsInput = z
  .strictObject({ points: Points, version: z.int().min(0).optional() })
  .meta({ id: 'WeightsInput' });
export type WeightsInput = z.infer<typeof WeightsInput>;

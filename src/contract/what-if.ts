import { CriterionLimit } from './criterion.ts';
import { listOf } from './list.ts';
import { WeightStatement } from './weights.ts';
import { z } from './zod.ts';

const MOST_CHANGES = 1_000;

/** What a what-if changes beside the study's ranking. */
export const WhatIfChanges = z
  .strictObject({
    /** Null: the study's weights. */
    weights: WeightStatement.nullable().default(null),
    /** By criterion id; null lifts a limit. */
    limits: z.record(z.uuid(), CriterionLimit.nullable()).default({}),
    /** Entered figures and ratings tried; null: as if there were none. */
    figures: z
      .array(z.strictObject({ siteId: z.uuid(), criterionId: z.uuid(), value: z.number().nullable() }))
      .max(MOST_CHANGES)
      .default([]),
    /** Sites left out. */
    leftOut: z.array(z.uuid()).max(MOST_CHANGES).default([]),
  })
  .meta({ id: 'WhatIfChanges' });
export type WhatIfChanges = z.infer<typeof WhatIfChanges>;

const name = z.string().trim().min(1, 'Give the what-if a name.').max(80, 'A name has up to 80 characters.');

export const WhatIf = z
  .object({
    id: z.uuid(),
    name: z.string(),
    /** Whether the study's members see it. */
    shared: z.boolean(),
    by: z.object({ userId: z.string(), name: z.string() }),
    mine: z.boolean(),
    changes: WhatIfChanges,
    version: z.int(),
    createdAt: z.iso.datetime(),
    updatedAt: z.iso.datetime(),
  })
  .meta({ id: 'WhatIf' });
export type WhatIf = z.infer<typeof WhatIf>;
export const WhatIfList = listOf(WhatIf);
export type WhatIfList = z.infer<typeof WhatIfList>;

export const WhatIfInput = z
  .strictObject({ name, changes: WhatIfChanges, shared: z.boolean().default(false) })
  .meta({ id: 'WhatIfInput' });
export type WhatIfInput = z.output<typeof WhatIfInput>;

export const WhatIfPatch = z
  .strictObject({
    name: name.optional(),
    changes: WhatIfChanges.optional(),
    shared: z.boolean().optional(),
    version: z.int().optional(),
  })
  .meta({ id: 'WhatIfPatch' });
export type WhatIfPatch = z.infer<typeof WhatIfPatch>;

/** A lead makes a what-if the study's own: weights, limits and figures are written, sites left out are removed. */
export const WhatIfAdoption = z
  .strictObject({
    reason: z.string().trim().min(1, 'Write the reason for adopting it.').max(2_000),
    version: z.int().optional(),
    /** The study's revision the choice was made on. */
    revision: z.int(),
  })
  .meta({ id: 'WhatIfAdoption' });
export type WhatIfAdoption = z.infer<typeof WhatIfAdoption>;

/** What an adoption did. */
export const WhatIfAdopted = z
  .object({
    weights: z.boolean().meta({ description: 'Whether the study’s weights were written' }),
    limits: z.array(z.uuid()).meta({ description: 'Criteria whose limit changed' }),
    figures: z.array(z.object({ siteId: z.uuid(), criterionId: z.uuid() })),
    /** Low and high figures that no longer held beside the adopted figure. */
    dropped: z.array(
      z.object({ siteId: z.uuid(), criterionId: z.uuid(), parts: z.array(z.enum(['low', 'high'])) }),
    ),
    removed: z.array(z.uuid()).meta({ description: 'Sites removed; they can be restored' }),
    ignored: z.int().meta({ description: 'Entries whose site or criterion has gone' }),
    revision: z.int(),
    savedAt: z.iso.datetime(),
  })
  .meta({ id: 'WhatIfAdopted' });
export type WhatIfAdopted = z.infer<typeof WhatIfAdopted>;

import { TrajectoryPoint } from './ascent.ts';
import { AscentFigures } from './ascent-job.ts';
import { LossesSource } from './requirement.ts';
import { z } from './zod.ts';

/** Sites × orbits that are asked for or shown at a time. */
export const MAX_STUDY_ASCENTS = 20_000;

const Pair = z.strictObject({ siteId: z.uuid(), orbitId: z.uuid() });
export type AscentPair = z.infer<typeof Pair>;

/** Which ascents a study asks for: those named, or every site and orbit that has no current one. */
export const AscentsInput = z
  .strictObject({
    pairs: z
      .array(Pair)
      .min(1, 'Name a site and an orbit, or leave pairs out for all.')
      .max(MAX_STUDY_ASCENTS)
      .optional(),
  })
  .meta({ id: 'AscentsInput' });
export type AscentsInput = z.infer<typeof AscentsInput>;

/** Narrows to one site or one orbit. */
export const AscentsScope = z.object({ siteId: z.uuid().optional(), orbitId: z.uuid().optional() });
export type AscentsScope = z.infer<typeof AscentsScope>;

export const AscentsQuery = AscentsScope.extend({
  list: z
    .enum(['true', 'false'])
    .default('true')
    .meta({ description: 'false leaves the items out: the counts alone' }),
});
export type AscentsQuery = z.infer<typeof AscentsQuery>;

/**
 * current: flown for what the study holds now. stale: flown for what it held before. The rest have nothing current:
 * asked for and waiting, being flown, failed (with the reason), cancelled, or never asked for.
 */
export const AscentStateName = z.enum([
  'current',
  'stale',
  'waiting',
  'flying',
  'failed',
  'cancelled',
  'missing',
]);
export type AscentStateName = z.infer<typeof AscentStateName>;

export const StudyAscent = z
  .object({
    siteId: z.uuid(),
    orbitId: z.uuid(),
    state: AscentStateName,
    reason: z.string().nullable().meta({ description: 'Why the last attempt failed, where it did' }),
    requestedBy: z.string().nullable().meta({ description: 'Name of who asked last' }),
    requestedAt: z.iso.datetime().nullable(),
    figures: AscentFigures.nullable().meta({
      description: 'The current result, or the last one of earlier inputs until there is a current one',
    }),
    figuresAreStale: z.boolean().meta({ description: 'The figures are of earlier inputs' }),
    flownAt: z.iso.datetime().nullable(),
    hash: z.string().nullable().meta({ description: 'SHA-256 of the inputs the figures are of' }),
  })
  .meta({ id: 'StudyAscent' });
export type StudyAscent = z.infer<typeof StudyAscent>;

const count = z.int();
export const StudyAscents = z
  .object({
    revision: z.int(),
    losses: LossesSource,
    obstacle: z.string().nullable().meta({ description: 'Why no ascent can be asked for, if so' }),
    counts: z.object({
      current: count,
      stale: count,
      waiting: count,
      flying: count,
      failed: count,
      cancelled: count,
      missing: count,
    }),
    secondsLeft: z.number().nullable().meta({
      description: 'Until what is asked for is flown, as fast as of late; null where nobody can say',
    }),
    items: z.array(StudyAscent),
  })
  .meta({ id: 'StudyAscents' });
export type StudyAscents = z.infer<typeof StudyAscents>;

/** One of them with its trajectory. */
export const StudyAscentDetail = StudyAscent.extend({ trajectory: z.array(TrajectoryPoint) }).meta({
  id: 'StudyAscentDetail',
});
export type StudyAscentDetail = z.infer<typeof StudyAscentDetail>;

/** What came of asking: how many are to be flown for it, and how many were current already. */
export const AscentsAsked = z.object({ underWay: count, current: count }).meta({ id: 'AscentsAsked' });
export type AscentsAsked = z.infer<typeof AscentsAsked>;

export const AscentsCancelled = z.object({ cancelled: count }).meta({ id: 'AscentsCancelled' });
export type AscentsCancelled = z.infer<typeof AscentsCancelled>;

import { listFields, listOf } from './list.ts';
import { z } from './zod.ts';

export const STUDY_STATES = ['draft', 'in-review', 'baselined'] as const;
export const StudyState = z.enum(STUDY_STATES);
export type StudyState = z.infer<typeof StudyState>;

export const STUDY_ROLES = ['lead', 'engineer', 'reviewer', 'reader'] as const;
export const StudyRole = z.enum(STUDY_ROLES);
export type StudyRole = z.infer<typeof StudyRole>;

export const StudyTitle = z
  .string()
  .trim()
  .min(1, 'A study has a title.')
  .max(160, 'A title has up to 160 characters.');
const Organisation = z.string().trim().max(120, 'An organisation’s name has up to 120 characters.');
const Question = z.string().trim().max(2000, 'A question has up to 2,000 characters.');
const DecideBy = z.iso.date('Write the day as YYYY-MM-DD.').nullable();

/** A study as its members see it; `role` is the reader's own. */
export const Study = z
  .object({
    id: z.uuid(),
    title: z.string(),
    organisation: z.string(),
    question: z.string(),
    decideBy: z.iso.date().nullable(),
    state: StudyState,
    archived: z.boolean(),
    role: StudyRole,
    revision: z
      .int()
      .meta({ description: 'One more at each change of the inputs or of the study’s weights' }),
    savedAt: z.iso.datetime().meta({ description: 'When the revision last moved' }),
    version: z.int().meta({ description: 'Of the fields here, for stale writes' }),
    updatedAt: z.iso.datetime(),
  })
  .meta({ id: 'Study' });
export type Study = z.infer<typeof Study>;

export const ARCHIVED_CHOICES = ['false', 'true', 'all'] as const;

/** The list of studies; archived ones only where they are asked for. */
export const StudyListQuery = z.object({
  ...listFields,
  state: StudyState.optional(),
  archived: z.enum(ARCHIVED_CHOICES).default('false'),
});
export type StudyListQuery = z.infer<typeof StudyListQuery>;

export const StudyList = listOf(Study);
export type StudyList = z.infer<typeof StudyList>;

/** A new study: blank, from the example, or a copy of a study one may read. */
export const StudyInput = z
  .strictObject({
    title: StudyTitle,
    from: z
      .union([z.literal(['blank', 'example']), z.uuid()])
      .default('blank')
      .meta({
        description: '"blank", "example", or the id of a study to copy',
      }),
  })
  .meta({ id: 'StudyInput' });
export type StudyInput = z.infer<typeof StudyInput>;

/** The study's own fields, as they are written on its first sheet. */
export const StudyHead = z.strictObject({
  title: StudyTitle,
  organisation: Organisation,
  question: Question,
  decideBy: DecideBy,
});
export type StudyHead = z.infer<typeof StudyHead>;

/** Only what is sent changes. `archived` is the lead's to send, and goes alone: an archived study takes nothing else. */
export const StudyPatch = z
  .strictObject({
    ...StudyHead.partial().shape,
    archived: z.boolean().optional(),
    version: z.int().optional(),
  })
  .refine(
    ({ archived, version: _, ...rest }) =>
      archived === undefined || Object.values(rest).every((value) => value === undefined),
    { path: ['archived'], error: 'Archive or restore in a request of its own.' },
  )
  .meta({ id: 'StudyPatch' });
export type StudyPatch = z.infer<typeof StudyPatch>;

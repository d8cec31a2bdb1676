import type { ColumnChoice } from '#core/csv/columns.ts';
import { COLUMN_FIELDS, recognise, type ColumnField } from '#core/csv/headings.ts';
import { MAX_COLUMNS, MAX_ROWS } from '#core/csv/limits.ts';
import { listFields, listOf } from './list.ts';
import { z } from './zod.ts';

/** A column of an uploaded file and what it is read as. */
export const UploadColumn = z
  .object({
    index: z.int().meta({ description: 'Place in the file, from 0' }),
    heading: z.string(),
    field: z.enum(COLUMN_FIELDS),
    unit: z.string().nullable().meta({ description: 'Elevation: m or ft. A criterion: its unit, or empty' }),
    criterion: z.string().nullable().meta({ description: 'Name of the entered criterion that it fills' }),
    criterionId: z.uuid().nullable().meta({ description: 'Null for a criterion that the commit will make' }),
    kind: z.enum(['number', 'rating', 'text']).nullable(),
    part: z
      .enum(['likely', 'low', 'high'])
      .nullable()
      .meta({ description: 'Which part of the criterion’s figure: x, x_low or x_high' }),
  })
  .meta({ id: 'UploadColumn' });

export const UploadReason = z
  .object({
    code: z.string(),
    severity: z.enum(['refusal', 'warning', 'change', 'note']),
    message: z.string(),
    field: z.string().nullable().meta({ description: 'A site’s key, a criterion’s name, or null: the row' }),
  })
  .meta({ id: 'UploadReason' });

/** A site as a row gives it: what could not be read is null. */
const ReadSite = z.object({
  code: z.string().nullable(),
  name: z.string(),
  latitudeDeg: z.number().nullable(),
  longitudeDeg: z.number().nullable(),
  elevationM: z.number().nullable(),
  permittedAzimuthsDeg: z
    .array(z.tuple([z.number(), z.number()]).readonly())
    .readonly()
    .nullable(),
  notes: z.string(),
  values: z
    .record(z.string(), z.union([z.number(), z.string()]))
    .meta({ description: 'Figures by criterion name' }),
  particulars: z
    .record(z.string(), z.object({ low: z.number().optional(), high: z.number().optional() }))
    .meta({ description: 'Low and high of those figures, by criterion name' }),
});

export const UploadRow = z
  .object({
    line: z.int().meta({ description: 'Physical line in the file, from 1, the heading included' }),
    outcome: z.enum(['new', 'duplicate', 'refused']),
    reasons: z.array(UploadReason).readonly(),
    site: ReadSite,
    duplicateOf: z.uuid().nullable().meta({ description: 'The study’s site that a duplicate is of' }),
  })
  .meta({ id: 'UploadRow' });

/** What a file came to; nothing is written to the sites yet. */
export const UploadPreview = z
  .object({
    uploadId: z.uuid(),
    fileName: z.string(),
    encoding: z.string(),
    delimiter: z.string(),
    decimalComma: z.boolean(),
    columns: z.array(UploadColumn).readonly(),
    counts: z.object({ new: z.int(), duplicate: z.int(), refused: z.int() }),
    rows: z.array(UploadRow),
  })
  .meta({ id: 'UploadPreview' });
export type UploadPreview = z.infer<typeof UploadPreview>;

/** A field by its key, or by any heading that is recognised as it: `latitude` and `lat` are `latitudeDeg`. */
const Field = z.string().transform((text, ctx): ColumnField => {
  const known = COLUMN_FIELDS.find((field) => field === text) ?? recognise(text)?.field;
  if (known !== undefined) return known;
  ctx.addIssue({ code: 'custom', message: `“${text}” is none of ${COLUMN_FIELDS.join(', ')}.` });
  return z.NEVER;
});

const ByPlace = z
  .array(z.object({ index: z.int().min(0), field: Field }))
  .max(MAX_COLUMNS)
  .transform((choices): ColumnChoice[] => choices.map(({ index, field }) => ({ column: index, field })));
const ByHeading = z
  .record(z.string(), Field)
  .transform((choices): ColumnChoice[] =>
    Object.entries(choices).map(([column, field]) => ({ column, field })),
  );

function fromJson(text: string, ctx: z.core.$RefinementCtx): unknown {
  try {
    return JSON.parse(text);
  } catch {
    ctx.addIssue({ code: 'custom', message: 'This is not JSON.' });
    return z.NEVER;
  }
}

const DELIMITER_NAMES: Readonly<Record<string, ',' | ';' | '\t'>> = {
  ',': ',',
  ';': ';',
  '\t': '\t',
  comma: ',',
  semicolon: ';',
  tab: '\t',
};
const ENCODING_NAMES: Readonly<Record<string, 'utf-8' | 'utf-16le' | 'utf-16be' | 'windows-1252'>> = {
  'utf-8': 'utf-8',
  utf8: 'utf-8',
  'utf-16le': 'utf-16le',
  'utf-16': 'utf-16le',
  'utf-16be': 'utf-16be',
  'windows-1252': 'windows-1252',
  cp1252: 'windows-1252',
};

function oneOf<T>(names: Readonly<Record<string, T>>) {
  return z.string().transform((text, ctx): T => {
    const found = Object.entries(names).find(([name]) => name === text.toLowerCase())?.[1];
    if (found !== undefined) return found;
    ctx.addIssue({
      code: 'custom',
      message: `“${text}” is none of ${Object.keys(names).join(', ').replace('\t', '\\t')}.`,
    });
    return z.NEVER;
  });
}

/**
 * What may be posted beside the file to change what was recognised: `columns` as JSON, either
 * `[{ "index": 2, "field": "latitudeDeg" }]` or `{ "breite": "latitudeDeg" }`.
 */
export const UploadOptions = z
  .object({
    columns: z
      .string()
      .transform(fromJson)
      .pipe(z.union([ByPlace, ByHeading]))
      .optional(),
    delimiter: oneOf(DELIMITER_NAMES).optional(),
    encoding: oneOf(ENCODING_NAMES).optional(),
  })
  .meta({ id: 'UploadOptions' });
export type UploadOptions = z.output<typeof UploadOptions>;

/** What of a preview to write. */
export const UploadCommit = z
  .strictObject({
    lines: z
      .union([z.literal('accepted'), z.array(z.int().min(1)).min(1, 'Name the lines to add.').max(MAX_ROWS)])
      .meta({ description: 'Every row that is not refused, or the rows that begin on these lines' }),
    duplicates: z
      .enum(['update', 'skip', 'add'])
      .default('skip')
      .meta({ description: 'Update the study’s site, leave it, or add the row under a fresh code and name' }),
  })
  .meta({ id: 'UploadCommit' });
export type UploadCommit = z.output<typeof UploadCommit>;

const saved = { revision: z.int(), savedAt: z.iso.datetime() };

export const UploadCommitted = z
  .object({
    uploadId: z.uuid(),
    added: z.int(),
    updated: z.int(),
    skipped: z.int().meta({ description: 'Duplicates that were left, and updates that changed nothing' }),
    sites: z.array(z.object({ line: z.int(), siteId: z.uuid(), action: z.enum(['add', 'change']) })),
    ...saved,
  })
  .meta({ id: 'UploadCommitted' });
export type UploadCommitted = z.infer<typeof UploadCommitted>;

export const UploadUndone = z
  .object({ uploadId: z.uuid(), removed: z.int(), restored: z.int(), ...saved })
  .meta({ id: 'UploadUndone' });
export type UploadUndone = z.infer<typeof UploadUndone>;

/** An upload as the list has it. */
export const UploadSummary = z
  .object({
    uploadId: z.uuid(),
    fileName: z.string(),
    byteLength: z.int(),
    sha256: z.string(),
    state: z.enum(['read', 'committed', 'undone']),
    added: z.int(),
    updated: z.int(),
    by: z.string(),
    createdAt: z.iso.datetime(),
    committedAt: z.iso.datetime().nullable(),
    undoneAt: z.iso.datetime().nullable(),
  })
  .meta({ id: 'UploadSummary' });
export type UploadSummary = z.infer<typeof UploadSummary>;

export const UploadListQuery = z.object(listFields);
export const UploadList = listOf(UploadSummary);
export type UploadList = z.infer<typeof UploadList>;

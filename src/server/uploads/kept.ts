import { FigureParticulars } from '#contract/site.ts';
import { z } from '#contract/zod.ts';
import { ENCODINGS } from '#core/csv/encoding.ts';
import { COLUMN_FIELDS } from '#core/csv/headings.ts';
import { DELIMITERS } from '#core/csv/tokenise.ts';

/** How a file was read, kept with it so that the commit reads it in the same way. */
export const Reading = z.object({
  columns: z
    .array(z.object({ column: z.union([z.int(), z.string()]), field: z.enum(COLUMN_FIELDS) }))
    .optional(),
  delimiter: z.enum(DELIMITERS),
  encoding: z.enum(ENCODINGS),
});
export type Reading = z.infer<typeof Reading>;

const fields = z.object({
  code: z.string(),
  name: z.string(),
  nameKey: z.string(),
  latitudeDeg: z.number(),
  longitudeDeg: z.number(),
  elevationM: z.number(),
  permittedAzimuthsDeg: z.array(z.tuple([z.number(), z.number()])),
  notes: z.string(),
  values: z.record(z.string(), z.union([z.number(), z.string()])),
  // A commit made before figures had particulars kept none, because there were none.
  particulars: z.record(z.string(), FigureParticulars).default({}),
});

/** What a commit did, kept with the upload so that it can be undone; versions are those the commit left. */
export const Effect = z.object({
  added: z.array(z.object({ id: z.uuid(), version: z.int() })),
  updated: z.array(z.object({ id: z.uuid(), version: z.int(), before: fields })),
  criteria: z.array(z.object({ id: z.uuid(), version: z.int() })),
});
export type Effect = z.infer<typeof Effect>;

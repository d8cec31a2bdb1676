import { listFields, listOf } from './list.ts';
import { z } from './zod.ts';

/** Largest evidence file, in bytes. */
export const MAX_EVIDENCE_BYTES = 10 * 1024 * 1024;
/** Files that one figure may have. */
export const MOST_FILES = 20;

/** What may be kept as evidence; told from the bytes, never from what the sender says. */
export const EVIDENCE_TYPES = {
  'application/pdf': 'PDF',
  'image/png': 'PNG picture',
  'image/jpeg': 'JPEG picture',
  'image/webp': 'WebP picture',
  'text/csv': 'CSV',
} as const;
export type EvidenceType = keyof typeof EVIDENCE_TYPES;

/** A file that supports an entered figure. */
export const Evidence = z
  .object({
    id: z.uuid(),
    siteId: z.uuid(),
    criterionId: z.uuid(),
    fileName: z.string(),
    mediaType: z.enum(Object.keys(EVIDENCE_TYPES) as [EvidenceType, ...EvidenceType[]]),
    byteLength: z.int(),
    sha256: z.string(),
    by: z.string(),
    createdAt: z.iso.datetime(),
  })
  .meta({ id: 'Evidence' });
export type Evidence = z.infer<typeof Evidence>;

/** Which figure's files; both left out: the whole study's. */
export const EvidenceQuery = z.object({
  ...listFields,
  siteId: z.uuid().optional(),
  criterionId: z.uuid().optional(),
});
export type EvidenceQuery = z.infer<typeof EvidenceQuery>;
export const EvidenceList = listOf(Evidence);
export type EvidenceList = z.infer<typeof EvidenceList>;

/** Whose figure a posted file supports. */
export const EvidenceInput = z.object({ siteId: z.uuid(), criterionId: z.uuid() });
export type EvidenceInput = z.infer<typeof EvidenceInput>;

const saved = { revision: z.int(), savedAt: z.iso.datetime() };

export const SavedEvidence = Evidence.extend(saved).meta({ id: 'SavedEvidence' });
export type SavedEvidence = z.infer<typeof SavedEvidence>;

export const EvidenceRemoved = z.object({ evidenceId: z.uuid(), ...saved });
export type EvidenceRemoved = z.infer<typeof EvidenceRemoved>;

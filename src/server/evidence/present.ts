import type { Evidence, EvidenceType } from '#contract/evidence.ts';
import type { EvidenceRow } from '#db/queries/evidence.ts';

export function presentEvidence({ createdAt, mediaType, ...row }: EvidenceRow): Evidence {
  // Only kinds that were told from the bytes are ever written.
  return { ...row, mediaType: mediaType as EvidenceType, createdAt: createdAt.toISOString() };
}

/** A file as the record keeps it: whose figure it supports and its checksum, not who and when, which the line says. */
export function recordedEvidence({
  by: _by,
  createdAt: _at,
  ...file
}: Evidence): Omit<Evidence, 'by' | 'createdAt'> {
  return file;
}

import type { EvidenceList, EvidenceQuery } from '#contract/evidence.ts';
import type { Db } from '#db/client.ts';
import { findEvidenceFile, listEvidence } from '#db/queries/evidence.ts';
import { notFound } from '#server/errors.ts';
import { attachmentHeaders } from '#server/posted-file.ts';
import { presentEvidence } from './present.ts';

/** One page of a study's evidence files, or of one figure's, the latest first. */
export async function readEvidence(
  db: Db,
  request: { studyId: string } & EvidenceQuery,
): Promise<EvidenceList> {
  const { items, total } = await listEvidence(db, request);
  return { items: items.map(presentEvidence), total };
}

/** The bytes as they came, to be saved and never shown. @throws AppError 'not-found' */
export async function readEvidenceFile(
  db: Db,
  scope: { studyId: string; evidenceId: string },
): Promise<Response> {
  const row = await findEvidenceFile(db, scope);
  if (!row) throw notFound('There is no such evidence file in this study.');
  return new Response(new Uint8Array(row.bytes), {
    headers: { 'content-type': row.mediaType, ...attachmentHeaders(row.fileName) },
  });
}

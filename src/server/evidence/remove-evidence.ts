import type { EvidenceRemoved } from '#contract/evidence.ts';
import type { PooledDb } from '#db/client.ts';
import { findEvidence, markEvidenceRemoved } from '#db/queries/evidence.ts';
import { changeStudy } from '#server/change-study.ts';
import { notFound } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { presentEvidence, recordedEvidence } from './present.ts';

/** Takes a file away from its figure; its bytes stay with the record and are given out no more. @throws AppError 'not-found' */
export async function removeEvidence(
  db: PooledDb,
  { member, evidenceId }: { member: Member; evidenceId: string },
): Promise<EvidenceRemoved> {
  const { studyId } = member;
  return changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    const row = await findEvidence(tx, { studyId, evidenceId });
    if (!row) throw notFound('There is no such evidence file in this study.');
    await markEvidenceRemoved(tx, { studyId, evidenceId });
    const from = recordedEvidence(presentEvidence(row));
    const entry = { object: 'evidence', objectId: evidenceId, action: 'remove', from };
    return { result: { evidenceId }, entries: [entry] };
  });
}

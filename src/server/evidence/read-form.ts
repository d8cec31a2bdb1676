import { EVIDENCE_TYPES, EvidenceInput, MAX_EVIDENCE_BYTES, type EvidenceType } from '#contract/evidence.ts';
import { listInWords } from '#contract/format.ts';
import { AppError } from '#server/errors.ts';
import { readPostedForm } from '#server/posted-file.ts';
import { kindOfFile } from './kind-of-file.ts';

/** An evidence file as it was posted, with what it is by its bytes. */
export interface PostedEvidence extends EvidenceInput {
  fileName: string;
  bytes: Uint8Array;
  mediaType: EvidenceType;
}

/** @throws AppError 'too-large' · 'invalid' where it is no kind that is kept, ZodError */
export async function readPostedEvidence(request: Request): Promise<PostedEvidence> {
  const limits = { mostBytes: MAX_EVIDENCE_BYTES, mostInWords: '10 MB', unnamed: 'evidence' };
  const { fileName, bytes, form } = await readPostedForm(request, limits);
  const figure = EvidenceInput.parse({
    siteId: form.get('siteId') ?? undefined,
    criterionId: form.get('criterionId') ?? undefined,
  });
  const mediaType = kindOfFile(bytes);
  if (mediaType !== undefined) return { ...figure, fileName, bytes, mediaType };
  const kinds = listInWords(Object.values(EVIDENCE_TYPES), 'or');
  const message = `${fileName} is no ${kinds} by its contents, whatever its name says.`;
  throw new AppError('invalid', `${message} Nothing was kept.`, { errors: [{ path: 'file', message }] });
}

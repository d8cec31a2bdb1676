import { createHash } from 'node:crypto';
import type { UploadPreview } from '#contract/upload.ts';
import type { PooledDb } from '#db/client.ts';
import { insertUpload } from '#db/queries/upload.ts';
import { changeStudy } from '#server/change-study.ts';
import type { Member } from '#server/member.ts';
import type { Reading } from './kept.ts';
import { readStudyFile } from './read-file.ts';
import type { PostedFile } from './read-form.ts';

/**
 * Reads a posted file against the study and keeps it; nothing is written to the sites. A study whose inputs are
 * locked takes no file.
 * @throws AppError 'too-large' · 'invalid', and then nothing is kept
 */
export async function previewUpload(
  db: PooledDb,
  { member, posted }: { member: Member; posted: PostedFile },
): Promise<UploadPreview> {
  const { studyId, userId } = member;
  const { fileName, options } = posted;
  const { file } = await readStudyFile(db, { studyId, ...posted });
  // The encoding and separator found stay those the person saw, whatever a later release would recognise.
  const reading: Reading = { ...options, encoding: file.encoding, delimiter: file.delimiter };
  const { uploadId } = await changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    const values = {
      fileName,
      bytes: Buffer.from(posted.bytes),
      sha256: createHash('sha256').update(posted.bytes).digest('hex'),
      reading,
      createdBy: userId,
    };
    return { result: { uploadId: await insertUpload(tx, { studyId, values }) }, entries: [] };
  });
  const { encoding, delimiter, decimalComma, columns, counts } = file;
  const rows = file.rows.map(({ cells: _cells, ...row }) => row);
  return { uploadId, fileName, encoding, delimiter, decimalComma, columns, counts, rows };
}

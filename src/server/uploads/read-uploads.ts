import type { UploadList, UploadSummary } from '#contract/upload.ts';
import type { Db } from '#db/client.ts';
import { findUpload, findUploadSummary, listUploads } from '#db/queries/upload.ts';
import { notFound } from '#server/errors.ts';
import { attachmentHeaders } from '#server/posted-file.ts';

type SummaryRow = NonNullable<Awaited<ReturnType<typeof findUploadSummary>>>;

function present({ id, createdAt, committedAt, undoneAt, ...row }: SummaryRow): UploadSummary {
  return {
    uploadId: id,
    ...row,
    createdAt: createdAt.toISOString(),
    committedAt: committedAt?.toISOString() ?? null,
    undoneAt: undoneAt?.toISOString() ?? null,
  };
}

/** One page of a study's uploads, the latest first. */
export async function readUploads(
  db: Db,
  request: { studyId: string; query: string; page: number; pageSize: number },
): Promise<UploadList> {
  const { items, total } = await listUploads(db, request);
  return { items: items.map(present), total };
}

interface OneUpload {
  studyId: string;
  uploadId: string;
}

/** @throws AppError 'not-found' */
export async function readUpload(db: Db, scope: OneUpload): Promise<UploadSummary> {
  const row = await findUploadSummary(db, scope);
  if (!row) throw notFound('There is no such upload in this study.');
  return present(row);
}

/** The original bytes under their name, as an attachment. @throws AppError 'not-found' */
export async function readUploadedFile(db: Db, scope: OneUpload): Promise<Response> {
  const row = await findUpload(db, scope);
  if (!row) throw notFound('There is no such upload in this study.');
  return new Response(new Uint8Array(row.bytes), {
    headers: { 'content-type': 'text/csv', ...attachmentHeaders(row.fileName) },
  });
}

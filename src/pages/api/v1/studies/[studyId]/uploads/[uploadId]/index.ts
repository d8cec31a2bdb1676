import type { APIRoute } from 'astro';
import { endpoint, json } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { readUpload } from '#server/uploads/read-uploads.ts';
import { undoUpload } from '#server/uploads/undo-upload.ts';

export const GET = endpoint(async ({ locals, params }) => {
  const { studyId } = requireMember(locals);
  return json(await readUpload(locals.db, { studyId, uploadId: params['uploadId'] ?? '' }));
}) satisfies APIRoute;

export const DELETE = endpoint(async ({ locals, params }) => {
  const member = requireMember(locals, 'input');
  return json(await undoUpload(locals.db, { member, uploadId: params['uploadId'] ?? '' }));
}) satisfies APIRoute;

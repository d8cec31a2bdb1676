import type { APIRoute } from 'astro';
import { endpoint } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { readUploadedFile } from '#server/uploads/read-uploads.ts';

export const GET = endpoint(({ locals, params }) => {
  const { studyId } = requireMember(locals);
  return readUploadedFile(locals.db, { studyId, uploadId: params['uploadId'] ?? '' });
}) satisfies APIRoute;

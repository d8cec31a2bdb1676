import type { APIRoute } from 'astro';
import { UploadCommit } from '#contract/upload.ts';
import { endpoint, json, readJson } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { commitUpload } from '#server/uploads/commit-upload.ts';

export const POST = endpoint(async ({ locals, params, request }) => {
  const member = requireMember(locals, 'input');
  const commit = await readJson(request, UploadCommit);
  return json(await commitUpload(locals.db, { member, uploadId: params['uploadId'] ?? '', commit }));
}) satisfies APIRoute;

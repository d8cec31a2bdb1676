import type { APIRoute } from 'astro';
import { UploadListQuery } from '#contract/upload.ts';
import { endpoint, json, readQuery } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { previewUpload } from '#server/uploads/preview-upload.ts';
import { readPostedFile } from '#server/uploads/read-form.ts';
import { readUploads } from '#server/uploads/read-uploads.ts';

export const GET = endpoint(async ({ locals, url }) => {
  const { studyId } = requireMember(locals);
  return json(await readUploads(locals.db, { studyId, ...readQuery(url, UploadListQuery) }));
}) satisfies APIRoute;

export const POST = endpoint(async ({ locals, request }) => {
  const member = requireMember(locals, 'input');
  const posted = await readPostedFile(request);
  return json(await previewUpload(locals.db, { member, posted }), { status: 201 });
}) satisfies APIRoute;

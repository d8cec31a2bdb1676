import type { APIRoute } from 'astro';
import { StudyPatch } from '#contract/study.ts';
import { baseVersion, endpoint, readJson, versioned } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { editStudy } from '#server/studies/edit-study.ts';
import { readStudy } from '#server/studies/read-studies.ts';

export const GET = endpoint(async ({ locals }) =>
  versioned(await readStudy(locals.db, requireMember(locals))),
) satisfies APIRoute;

export const PATCH = endpoint(async ({ locals, request }) => {
  const member = requireMember(locals, 'input');
  const patch = await readJson(request, StudyPatch);
  const version = baseVersion(request, patch.version);
  return versioned(await editStudy(locals.db, { member, version, patch }));
}) satisfies APIRoute;

/** Archives: nothing is deleted. */
export const DELETE = endpoint(async ({ locals, request }) => {
  const member = requireMember(locals, 'lead');
  const version = baseVersion(request);
  return versioned(await editStudy(locals.db, { member, version, patch: { archived: true } }));
}) satisfies APIRoute;

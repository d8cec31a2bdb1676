import type { APIRoute } from 'astro';
import { EvidenceQuery } from '#contract/evidence.ts';
import { endpoint, json, readQuery } from '#server/endpoint.ts';
import { addEvidence } from '#server/evidence/add-evidence.ts';
import { readEvidence } from '#server/evidence/read-evidence.ts';
import { readPostedEvidence } from '#server/evidence/read-form.ts';
import { requireMember } from '#server/member.ts';

export const GET = endpoint(async ({ locals, url }) => {
  const { studyId } = requireMember(locals);
  return json(await readEvidence(locals.db, { studyId, ...readQuery(url, EvidenceQuery) }));
}) satisfies APIRoute;

export const POST = endpoint(async ({ locals, request }) => {
  const member = requireMember(locals, 'input');
  const posted = await readPostedEvidence(request);
  return json(await addEvidence(locals.db, { member, posted }), { status: 201 });
}) satisfies APIRoute;

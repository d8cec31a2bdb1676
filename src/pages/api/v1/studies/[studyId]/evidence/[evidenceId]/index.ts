import type { APIRoute } from 'astro';
import { endpoint, json } from '#server/endpoint.ts';
import { removeEvidence } from '#server/evidence/remove-evidence.ts';
import { requireMember } from '#server/member.ts';

export const DELETE = endpoint(async ({ locals, params }) => {
  const member = requireMember(locals, 'input');
  return json(await removeEvidence(locals.db, { member, evidenceId: params['evidenceId'] ?? '' }));
}) satisfies APIRoute;

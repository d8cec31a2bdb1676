import type { APIRoute } from 'astro';
import { endpoint, json } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { readMemberWeights } from '#server/weights/member-weights.ts';

export const GET = endpoint(async ({ locals }) => {
  const { studyId, userId } = requireMember(locals);
  return json(await readMemberWeights(locals.db, { studyId, userId }));
}) satisfies APIRoute;

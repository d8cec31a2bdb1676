import type { APIRoute } from 'astro';
import { endpoint } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { respondWithInputs } from '#server/memo/respond.ts';

export const GET = endpoint(({ locals }) => {
  const { studyId, userId } = requireMember(locals);
  return respondWithInputs(locals.db, { studyId, userId });
}) satisfies APIRoute;

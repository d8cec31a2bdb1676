import type { APIRoute } from 'astro';
import { endpoint } from '#server/endpoint.ts';
import { respondForStudy } from '#server/evaluate/respond-for-study.ts';
import { requireMember } from '#server/member.ts';

export const GET = endpoint(({ locals }) => {
  const { studyId } = requireMember(locals);
  return respondForStudy(locals.db, { studyId });
}) satisfies APIRoute;

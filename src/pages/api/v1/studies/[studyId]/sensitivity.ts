import type { APIRoute } from 'astro';
import { SensitivityQuery } from '#contract/sensitivity.ts';
import { endpoint, readQuery } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { respondWithSensitivity } from '#server/ranking/read-sensitivity.ts';

export const GET = endpoint(({ locals, url }) => {
  const { studyId, userId } = requireMember(locals);
  return respondWithSensitivity(locals.db, { studyId, userId, query: readQuery(url, SensitivityQuery) });
}) satisfies APIRoute;

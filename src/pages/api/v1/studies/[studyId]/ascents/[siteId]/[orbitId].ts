import type { APIRoute } from 'astro';
import { readAscent } from '#server/ascents/read-ascents.ts';
import { endpoint, json } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';

export const GET = endpoint(async ({ locals, params }) => {
  const { studyId } = requireMember(locals);
  const { siteId = '', orbitId = '' } = params;
  return json(await readAscent(locals.db, { studyId, siteId, orbitId }));
}) satisfies APIRoute;

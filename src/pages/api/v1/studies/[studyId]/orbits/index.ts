import type { APIRoute } from 'astro';
import { ListQuery } from '#contract/list.ts';
import { OrbitInput } from '#contract/requirement.ts';
import { endpoint, json, readJson, readQuery, versioned } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { addOrbit } from '#server/requirement/add-orbit.ts';
import { listOrbits } from '#server/requirement/read-requirement.ts';

export const GET = endpoint(async ({ locals, url }) => {
  const { studyId } = requireMember(locals);
  return json(await listOrbits(locals.db, { studyId, ...readQuery(url, ListQuery) }));
}) satisfies APIRoute;

export const POST = endpoint(async ({ locals, request }) => {
  const member = requireMember(locals, 'input');
  const input = await readJson(request, OrbitInput);
  return versioned(await addOrbit(locals.db, { member, input }), 201);
}) satisfies APIRoute;

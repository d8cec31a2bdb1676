import type { APIRoute } from 'astro';
import { OrbitPatch } from '#contract/requirement.ts';
import { z } from '#contract/zod.ts';
import { baseVersion, endpoint, json, readJson, versioned } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { changeOrbit } from '#server/requirement/change-orbit.ts';
import { readOrbit } from '#server/requirement/read-requirement.ts';
import { removeOrbit } from '#server/requirement/remove-orbit.ts';

const Params = z.object({ orbitId: z.uuid() });

export const GET = endpoint(async ({ locals, params }) => {
  const { studyId } = requireMember(locals);
  return versioned(await readOrbit(locals.db, { studyId, ...Params.parse(params) }));
}) satisfies APIRoute;

export const PATCH = endpoint(async ({ locals, params, request }) => {
  const member = requireMember(locals, 'input');
  const { orbitId } = Params.parse(params);
  const patch = await readJson(request, OrbitPatch);
  const version = baseVersion(request, patch.version);
  return versioned(await changeOrbit(locals.db, { member, orbitId, version, patch }));
}) satisfies APIRoute;

export const DELETE = endpoint(async ({ locals, params, request }) => {
  const member = requireMember(locals, 'input');
  const { orbitId } = Params.parse(params);
  return json(await removeOrbit(locals.db, { member, orbitId, version: baseVersion(request) }));
}) satisfies APIRoute;

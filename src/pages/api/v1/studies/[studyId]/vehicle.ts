import type { APIRoute } from 'astro';
import { StudyVehicleInput } from '#contract/requirement.ts';
import { baseVersion, endpoint, readJson, versioned } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { putVehicle, removeVehicle } from '#server/requirement/change-vehicle.ts';
import { readVehicle } from '#server/requirement/read-requirement.ts';

export const GET = endpoint(async ({ locals }) => {
  const { studyId } = requireMember(locals);
  return versioned(await readVehicle(locals.db, { studyId }));
}) satisfies APIRoute;

/** A first vehicle replaces nothing, so it needs no version. */
export const PUT = endpoint(async ({ locals, request }) => {
  const member = requireMember(locals, 'input');
  const input = await readJson(request, StudyVehicleInput);
  const version = request.headers.has('if-match') ? baseVersion(request) : input.version;
  return versioned(await putVehicle(locals.db, { member, version, input }));
}) satisfies APIRoute;

export const DELETE = endpoint(async ({ locals, request }) => {
  const member = requireMember(locals, 'input');
  return versioned(await removeVehicle(locals.db, { member, version: baseVersion(request) }));
}) satisfies APIRoute;

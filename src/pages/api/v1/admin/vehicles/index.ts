import type { APIRoute } from 'astro';
import { LibraryVehicleInput } from '#contract/admin.ts';
import { ListQuery } from '#contract/list.ts';
import { addVehicle, readLibrary } from '#server/admin/vehicles.ts';
import { endpoint, json, readJson, readQuery, versioned } from '#server/endpoint.ts';
import { requireUser } from '#server/member.ts';

export const GET = endpoint(async ({ locals, url }) =>
  json(await readLibrary(locals.db, readQuery(url, ListQuery))),
) satisfies APIRoute;

export const POST = endpoint(async ({ locals, request }) => {
  const input = await readJson(request, LibraryVehicleInput);
  return versioned(await addVehicle(locals.db, requireUser(locals), input), 201);
}) satisfies APIRoute;

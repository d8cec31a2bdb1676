import type { APIRoute } from 'astro';
import { LibraryVehiclePatch } from '#contract/admin.ts';
import { changeVehicle, readVehicle } from '#server/admin/vehicles.ts';
import { baseVersion, endpoint, readJson, versioned } from '#server/endpoint.ts';
import { requireUser } from '#server/member.ts';

export const GET = endpoint(async ({ locals, params }) =>
  versioned(await readVehicle(locals.db, params['vehicleId'] ?? '')),
) satisfies APIRoute;

export const PATCH = endpoint(async ({ locals, params, request }) => {
  const patch = await readJson(request, LibraryVehiclePatch);
  const change = {
    vehicleId: params['vehicleId'] ?? '',
    version: baseVersion(request, patch.version),
    patch,
  };
  return versioned(await changeVehicle(locals.db, requireUser(locals), change));
}) satisfies APIRoute;

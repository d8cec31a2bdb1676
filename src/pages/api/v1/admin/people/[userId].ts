import type { APIRoute } from 'astro';
import { PersonPatch } from '#contract/admin.ts';
import { changePerson } from '#server/admin/people.ts';
import { baseVersion, endpoint, readJson, versioned } from '#server/endpoint.ts';
import { requireUser } from '#server/member.ts';

export const PATCH = endpoint(async ({ locals, params, request }) => {
  const patch = await readJson(request, PersonPatch);
  const change = {
    administratorId: requireUser(locals).userId,
    userId: params['userId'] ?? '',
    version: baseVersion(request, patch.version),
    patch,
  };
  return versioned(await changePerson(locals.db, change));
}) satisfies APIRoute;

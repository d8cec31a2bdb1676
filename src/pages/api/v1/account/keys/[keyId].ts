import type { APIRoute } from 'astro';
import { withdrawKey } from '#server/account/keys.ts';
import { endpoint, noContent } from '#server/endpoint.ts';
import { requireUser } from '#server/member.ts';

export const DELETE = endpoint(async ({ locals, params }) => {
  await withdrawKey(locals.db, requireUser(locals), params['keyId'] ?? '');
  return noContent();
}) satisfies APIRoute;

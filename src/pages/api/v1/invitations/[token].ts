import type { APIRoute } from 'astro';
import { Acceptance } from '#contract/account.ts';
import { acceptInvitation } from '#server/account/accept-invitation.ts';
import { endpoint, readJson } from '#server/endpoint.ts';

/** Whoever holds the link makes the account and is signed in. */
export const POST = endpoint(async ({ locals, params, request }) => {
  const input = await readJson(request, Acceptance);
  const cookies = await acceptInvitation(locals.db, params['token'] ?? '', input);
  const response = new Response(null, { status: 204 });
  for (const cookie of cookies) response.headers.append('set-cookie', cookie);
  return response;
}) satisfies APIRoute;

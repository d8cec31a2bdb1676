import type { APIRoute } from 'astro';
import { withdrawInvitation } from '#server/admin/invitations.ts';
import { endpoint, noContent } from '#server/endpoint.ts';
import { requireUser } from '#server/member.ts';

export const DELETE = endpoint(async ({ locals, params }) => {
  await withdrawInvitation(locals.db, requireUser(locals), params['invitationId'] ?? '');
  return noContent();
}) satisfies APIRoute;

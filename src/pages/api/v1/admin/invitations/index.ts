import type { APIRoute } from 'astro';
import { InvitationInput } from '#contract/admin.ts';
import { ListQuery } from '#contract/list.ts';
import { invite, readInvitations } from '#server/admin/invitations.ts';
import { endpoint, json, readJson, readQuery } from '#server/endpoint.ts';
import { requireUser } from '#server/member.ts';

export const GET = endpoint(async ({ locals, url }) =>
  json(await readInvitations(locals.db, readQuery(url, ListQuery))),
) satisfies APIRoute;

export const POST = endpoint(async ({ locals, request }) => {
  const input = await readJson(request, InvitationInput);
  return json(await invite(locals.db, requireUser(locals), input), { status: 201 });
}) satisfies APIRoute;

import type { APIRoute } from 'astro';
import { ListQuery } from '#contract/list.ts';
import { MemberInput } from '#contract/member.ts';
import { endpoint, json, readJson, readQuery, versioned } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { addMember } from '#server/members/add-member.ts';
import { listMembers } from '#server/members/list-members.ts';

export const GET = endpoint(async ({ locals, url }) => {
  const member = requireMember(locals);
  return json(await listMembers(locals.db, { member, ...readQuery(url, ListQuery) }));
}) satisfies APIRoute;

export const POST = endpoint(async ({ locals, request }) => {
  const member = requireMember(locals, 'lead');
  const input = await readJson(request, MemberInput);
  return versioned(await addMember(locals.db, { member, input }), 201);
}) satisfies APIRoute;

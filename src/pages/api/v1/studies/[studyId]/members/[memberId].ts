import type { APIRoute } from 'astro';
import { MemberPatch } from '#contract/member.ts';
import { z } from '#contract/zod.ts';
import { baseVersion, endpoint, noContent, readJson, versioned } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { changeRole } from '#server/members/change-role.ts';
import { removeMember } from '#server/members/remove-member.ts';

const Params = z.object({ memberId: z.uuid() });

export const PATCH = endpoint(async ({ locals, params, request }) => {
  const member = requireMember(locals, 'lead');
  const { memberId } = Params.parse(params);
  const { role, version } = await readJson(request, MemberPatch);
  const base = baseVersion(request, version);
  return versioned(await changeRole(locals.db, { member, memberId, version: base, role }));
}) satisfies APIRoute;

/** A lead removes anyone; every member may leave. */
export const DELETE = endpoint(async ({ locals, params, request }) => {
  const member = requireMember(locals);
  const { memberId } = Params.parse(params);
  await removeMember(locals.db, { member, memberId, version: baseVersion(request) });
  return noContent();
}) satisfies APIRoute;

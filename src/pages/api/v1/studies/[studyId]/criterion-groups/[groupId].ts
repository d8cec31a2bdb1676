import type { APIRoute } from 'astro';
import { CriterionGroupPatch } from '#contract/criterion.ts';
import { removeGroup, renameGroup } from '#server/criteria/groups/change-group.ts';
import { baseVersion, endpoint, noContent, readJson, versioned } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';

export const PATCH = endpoint(async ({ locals, params, request }) => {
  const member = requireMember(locals, 'input');
  const { name, version } = await readJson(request, CriterionGroupPatch);
  const change = {
    member,
    groupId: params['groupId'] ?? '',
    version: baseVersion(request, version),
    name,
  };
  return versioned(await renameGroup(locals.db, change));
}) satisfies APIRoute;

export const DELETE = endpoint(async ({ locals, params, request }) => {
  const member = requireMember(locals, 'input');
  await removeGroup(locals.db, { member, groupId: params['groupId'] ?? '', version: baseVersion(request) });
  return noContent();
}) satisfies APIRoute;

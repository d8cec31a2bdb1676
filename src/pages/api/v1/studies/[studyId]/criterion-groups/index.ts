import type { APIRoute } from 'astro';
import { CriterionGroupInput } from '#contract/criterion.ts';
import { ListQuery } from '#contract/list.ts';
import { addGroup } from '#server/criteria/groups/add-group.ts';
import { listGroupsPage } from '#server/criteria/groups/read-groups.ts';
import { endpoint, json, readJson, readQuery, versioned } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';

export const GET = endpoint(async ({ locals, url }) => {
  const { studyId } = requireMember(locals);
  return json(await listGroupsPage(locals.db, { studyId, ...readQuery(url, ListQuery) }));
}) satisfies APIRoute;

export const POST = endpoint(async ({ locals, request }) => {
  const member = requireMember(locals, 'input');
  const { name } = await readJson(request, CriterionGroupInput);
  return versioned(await addGroup(locals.db, { member, name }), 201);
}) satisfies APIRoute;

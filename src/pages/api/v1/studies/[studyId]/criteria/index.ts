import type { APIRoute } from 'astro';
import { CriterionInput } from '#contract/criterion.ts';
import { ListQuery } from '#contract/list.ts';
import { addCriterion } from '#server/criteria/add-criterion.ts';
import { listCriteriaPage } from '#server/criteria/read-criteria.ts';
import { endpoint, json, readJson, readQuery, versioned } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';

export const GET = endpoint(async ({ locals, url }) => {
  const { studyId } = requireMember(locals);
  const query = readQuery(url, ListQuery);
  return json(await listCriteriaPage(locals.db, { studyId, ...query }));
}) satisfies APIRoute;

export const POST = endpoint(async ({ locals, request }) => {
  const member = requireMember(locals, 'input');
  const input = await readJson(request, CriterionInput);
  return versioned(await addCriterion(locals.db, { member, input }), 201);
}) satisfies APIRoute;

import type { APIRoute } from 'astro';
import { ListQuery } from '#contract/list.ts';
import { WhatIfInput } from '#contract/what-if.ts';
import { endpoint, json, readJson, readQuery, versioned } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { keepWhatIf } from '#server/what-ifs/keep-what-if.ts';
import { readWhatIfs } from '#server/what-ifs/read-what-ifs.ts';

export const GET = endpoint(async ({ locals, url }) => {
  const { studyId, userId } = requireMember(locals);
  return json(await readWhatIfs(locals.db, { studyId, userId, ...readQuery(url, ListQuery) }));
}) satisfies APIRoute;

export const POST = endpoint(async ({ locals, request }) => {
  const member = requireMember(locals, 'weigh');
  const input = await readJson(request, WhatIfInput);
  return versioned(await keepWhatIf(locals.db, { member, input }), 201);
}) satisfies APIRoute;

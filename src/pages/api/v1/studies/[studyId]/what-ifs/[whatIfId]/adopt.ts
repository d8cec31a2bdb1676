import type { APIRoute } from 'astro';
import { WhatIfAdoption } from '#contract/what-if.ts';
import { baseVersion, endpoint, json, readJson } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { adoptWhatIf } from '#server/what-ifs/adopt-what-if.ts';

export const POST = endpoint(async ({ locals, params, request }) => {
  const member = requireMember(locals, 'lead');
  const adoption = await readJson(request, WhatIfAdoption);
  const version = baseVersion(request, adoption.version);
  const whatIfId = params['whatIfId'] ?? '';
  return json(await adoptWhatIf(locals.db, { member, whatIfId, version, adoption }));
}) satisfies APIRoute;

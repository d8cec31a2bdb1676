import type { APIRoute } from 'astro';
import { WhatIfPatch } from '#contract/what-if.ts';
import { baseVersion, endpoint, noContent, readJson, versioned } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { changeWhatIf } from '#server/what-ifs/change-what-if.ts';
import { letWhatIfGo } from '#server/what-ifs/let-what-if-go.ts';
import { readWhatIf } from '#server/what-ifs/read-what-ifs.ts';

export const GET = endpoint(async ({ locals, params }) => {
  const { studyId, userId } = requireMember(locals);
  return versioned(await readWhatIf(locals.db, { studyId, userId, whatIfId: params['whatIfId'] ?? '' }));
}) satisfies APIRoute;

export const PATCH = endpoint(async ({ locals, params, request }) => {
  const member = requireMember(locals, 'weigh');
  const { version, ...patch } = await readJson(request, WhatIfPatch);
  const whatIfId = params['whatIfId'] ?? '';
  const change = { member, whatIfId, version: baseVersion(request, version), patch };
  return versioned(await changeWhatIf(locals.db, change));
}) satisfies APIRoute;

export const DELETE = endpoint(async ({ locals, params, request }) => {
  const member = requireMember(locals, 'weigh');
  const whatIfId = params['whatIfId'] ?? '';
  await letWhatIfGo(locals.db, { member, whatIfId, version: baseVersion(request) });
  return noContent();
}) satisfies APIRoute;

import type { APIRoute } from 'astro';
import { AscentsInput, AscentsQuery, AscentsScope } from '#contract/study-ascents.ts';
import { askAscents } from '#server/ascents/ask-ascents.ts';
import { cancelAscents } from '#server/ascents/cancel-ascents.ts';
import { readAscents } from '#server/ascents/read-ascents.ts';
import { endpoint, json, readJson, readQuery } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';

export const GET = endpoint(async ({ locals, url }) => {
  const { studyId } = requireMember(locals);
  return json(await readAscents(locals.db, { studyId, query: readQuery(url, AscentsQuery) }));
}) satisfies APIRoute;

export const POST = endpoint(async ({ locals, request }) => {
  const member = requireMember(locals, 'input');
  const input = await readJson(request, AscentsInput);
  return json(await askAscents(locals.db, { member, input }), { status: 202 });
}) satisfies APIRoute;

export const DELETE = endpoint(async ({ locals, url }) => {
  const member = requireMember(locals, 'input');
  return json(await cancelAscents(locals.db, { member, scope: readQuery(url, AscentsScope) }));
}) satisfies APIRoute;

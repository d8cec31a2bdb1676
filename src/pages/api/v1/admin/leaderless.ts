import type { APIRoute } from 'astro';
import { NewLead } from '#contract/admin.ts';
import { ListQuery } from '#contract/list.ts';
import { nameLead, readLeaderless } from '#server/admin/leaderless.ts';
import { endpoint, json, noContent, readJson, readQuery } from '#server/endpoint.ts';
import { requireUser } from '#server/member.ts';

export const GET = endpoint(async ({ locals, url }) =>
  json(await readLeaderless(locals.db, readQuery(url, ListQuery))),
) satisfies APIRoute;

export const POST = endpoint(async ({ locals, request }) => {
  await nameLead(locals.db, requireUser(locals), await readJson(request, NewLead));
  return noContent();
}) satisfies APIRoute;

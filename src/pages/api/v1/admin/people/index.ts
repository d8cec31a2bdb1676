import type { APIRoute } from 'astro';
import { ListQuery } from '#contract/list.ts';
import { readPeople } from '#server/admin/people.ts';
import { endpoint, json, readQuery } from '#server/endpoint.ts';
import { requireUser } from '#server/member.ts';

export const GET = endpoint(async ({ locals, url }) =>
  json(await readPeople(locals.db, requireUser(locals).userId, readQuery(url, ListQuery))),
) satisfies APIRoute;

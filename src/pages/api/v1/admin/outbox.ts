import type { APIRoute } from 'astro';
import { ListQuery } from '#contract/list.ts';
import { readOutbox } from '#server/admin/outbox.ts';
import { endpoint, json, readQuery } from '#server/endpoint.ts';

export const GET = endpoint(async ({ locals, url }) =>
  json(await readOutbox(locals.db, readQuery(url, ListQuery))),
) satisfies APIRoute;

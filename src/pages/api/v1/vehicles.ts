import type { APIRoute } from 'astro';
import { ListQuery } from '#contract/list.ts';
import { endpoint, json, readQuery } from '#server/endpoint.ts';
import { listVehicles } from '#server/requirement/read-requirement.ts';

/** The shared library, for whoever chooses a vehicle. */
export const GET = endpoint(async ({ locals, url }) =>
  json(await listVehicles(locals.db, readQuery(url, ListQuery))),
) satisfies APIRoute;

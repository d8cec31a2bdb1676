import type { APIRoute } from 'astro';
import { AscentInput } from '#contract/ascent.ts';
import { respondWithAscent } from '#server/ascents/respond.ts';
import { endpoint, readJson } from '#server/endpoint.ts';

export const POST = endpoint(async ({ request }) =>
  respondWithAscent(await readJson(request, AscentInput)),
) satisfies APIRoute;

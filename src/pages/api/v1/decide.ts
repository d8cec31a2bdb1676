import type { APIRoute } from 'astro';
import { DecideInput } from '#contract/decide.ts';
import { respondWithDecision } from '#server/decide/respond.ts';
import { endpoint, readJson } from '#server/endpoint.ts';

export const POST = endpoint(async ({ request }) =>
  respondWithDecision(await readJson(request, DecideInput)),
) satisfies APIRoute;

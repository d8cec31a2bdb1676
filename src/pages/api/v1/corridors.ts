import type { APIRoute } from 'astro';
import { CorridorInput } from '#contract/corridor.ts';
import { respondWithCorridor } from '#server/corridors/respond.ts';
import { endpoint, readJson } from '#server/endpoint.ts';

export const POST = endpoint(async ({ request }) =>
  respondWithCorridor(await readJson(request, CorridorInput)),
) satisfies APIRoute;

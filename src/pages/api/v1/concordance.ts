import type { APIRoute } from 'astro';
import { ConcordanceInput } from '#contract/compare.ts';
import { compareRankings } from '#server/decide/compare-rankings.ts';
import { endpoint, json, readJson } from '#server/endpoint.ts';

export const POST = endpoint(async ({ request }) =>
  json(compareRankings(await readJson(request, ConcordanceInput))),
) satisfies APIRoute;

import type { APIRoute } from 'astro';
import { PairwiseInput } from '#contract/compare.ts';
import { compareCriteria } from '#server/decide/compare-criteria.ts';
import { endpoint, json, readJson } from '#server/endpoint.ts';

export const POST = endpoint(async ({ request }) =>
  json(compareCriteria(await readJson(request, PairwiseInput))),
) satisfies APIRoute;

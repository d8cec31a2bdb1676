import type { APIRoute } from 'astro';
import { ImpactPointInput } from '#contract/impact-point.ts';
import { findImpactPoint } from '#server/ascents/find-impact-point.ts';
import { endpoint, json, readJson } from '#server/endpoint.ts';

export const POST = endpoint(async ({ request }) =>
  json(findImpactPoint(await readJson(request, ImpactPointInput))),
) satisfies APIRoute;

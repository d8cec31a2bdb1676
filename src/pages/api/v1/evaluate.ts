import type { APIRoute } from 'astro';
import { EvaluateInput } from '#contract/evaluate.ts';
import { endpoint, readJson } from '#server/endpoint.ts';
import { respondWithEvaluation } from '#server/evaluate/respond.ts';

export const POST = endpoint(async ({ request }) =>
  respondWithEvaluation(await readJson(request, EvaluateInput)),
) satisfies APIRoute;

import type { APIRoute } from 'astro';
import { WeightsInput, WeightsQuery } from '#contract/weights.ts';
import { baseVersion, endpoint, readJson, readQuery, versioned } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { readWeights } from '#server/weights/read-weights.ts';
import { saveWeights } from '#server/weights/save-weights.ts';

const whose = (url: URL) => readQuery(url, WeightsQuery).weights;

export const GET = endpoint(async ({ locals, url }) => {
  const { studyId, userId } = requireMember(locals);
  return versioned(await readWeights(locals.db, { studyId, userId, weights: whose(url) }));
}) satisfies APIRoute;

export const PUT = endpoint(async ({ locals, request, url }) => {
  const member = requireMember(locals, 'weigh');
  const input = await readJson(request, WeightsInput);
  const version = baseVersion(request, input.version);
  return versioned(await saveWeights(locals.db, { member, weights: whose(url), version, input }));
}) satisfies APIRoute;

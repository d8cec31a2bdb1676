import type { APIRoute } from 'astro';
import { WeightsChoice } from '#contract/weights.ts';
import { baseVersion, endpoint, readJson, versioned } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { chooseWeights } from '#server/weights/choose-weights.ts';

export const POST = endpoint(async ({ locals, request }) => {
  const member = requireMember(locals, 'lead');
  const choice = await readJson(request, WeightsChoice);
  const version = baseVersion(request, choice.version);
  return versioned(await chooseWeights(locals.db, { member, version, choice }));
}) satisfies APIRoute;

import type { APIRoute } from 'astro';
import { CriterionPatch } from '#contract/criterion.ts';
import { changeCriterion } from '#server/criteria/change-criterion.ts';
import { readCriterion } from '#server/criteria/read-criteria.ts';
import { removeCriterion } from '#server/criteria/remove-criterion.ts';
import { baseVersion, endpoint, noContent, readJson, versioned } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';

export const GET = endpoint(async ({ locals, params }) => {
  const { studyId } = requireMember(locals);
  return versioned(await readCriterion(locals.db, { studyId, criterionId: params['criterionId'] ?? '' }));
}) satisfies APIRoute;

export const PATCH = endpoint(async ({ locals, params, request }) => {
  const member = requireMember(locals, 'input');
  const { version, ...patch } = await readJson(request, CriterionPatch);
  const change = {
    member,
    criterionId: params['criterionId'] ?? '',
    version: baseVersion(request, version),
    patch,
  };
  return versioned(await changeCriterion(locals.db, change));
}) satisfies APIRoute;

export const DELETE = endpoint(async ({ locals, params, request }) => {
  const member = requireMember(locals, 'input');
  const criterionId = params['criterionId'] ?? '';
  await removeCriterion(locals.db, { member, criterionId, version: baseVersion(request) });
  return noContent();
}) satisfies APIRoute;

import type { APIRoute } from 'astro';
import { endpoint, json } from '#server/endpoint.ts';
import { loadStudyInputs } from '#server/evaluate/study-inputs.ts';
import { requireMember } from '#server/member.ts';

export const GET = endpoint(async ({ locals }) =>
  json(await loadStudyInputs(locals.db, requireMember(locals).studyId)),
) satisfies APIRoute;

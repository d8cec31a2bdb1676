import type { APIRoute } from 'astro';
import { endpoint } from '#server/endpoint.ts';
import { respondWithEvaluation } from '#server/evaluate/respond.ts';
import { loadStudyInputs } from '#server/evaluate/study-inputs.ts';
import { requireMember } from '#server/member.ts';

export const GET = endpoint(async ({ locals }) => {
  const { revision, ...inputs } = await loadStudyInputs(locals.db, requireMember(locals).studyId);
  return respondWithEvaluation(
    { ...inputs, vehicle: inputs.vehicle ?? undefined, others: true },
    { revision },
  );
}) satisfies APIRoute;

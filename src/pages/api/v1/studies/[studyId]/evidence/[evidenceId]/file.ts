import type { APIRoute } from 'astro';
import { endpoint } from '#server/endpoint.ts';
import { readEvidenceFile } from '#server/evidence/read-evidence.ts';
import { requireMember } from '#server/member.ts';

export const GET = endpoint(({ locals, params }) => {
  const { studyId } = requireMember(locals);
  return readEvidenceFile(locals.db, { studyId, evidenceId: params['evidenceId'] ?? '' });
}) satisfies APIRoute;

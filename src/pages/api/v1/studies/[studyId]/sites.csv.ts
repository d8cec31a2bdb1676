import type { APIRoute } from 'astro';
import { endpoint } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { exportCsv } from '#server/sites/export-csv.ts';

export const GET = endpoint(({ locals }) => {
  const { studyId } = requireMember(locals);
  return exportCsv(locals.db, { studyId });
}) satisfies APIRoute;

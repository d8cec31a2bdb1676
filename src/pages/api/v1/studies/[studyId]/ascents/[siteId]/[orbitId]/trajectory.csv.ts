import type { APIRoute } from 'astro';
import { exportTrajectoryCsv } from '#server/ascents/export-csv.ts';
import { endpoint } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';

export const GET = endpoint(({ locals, params }) => {
  const { studyId } = requireMember(locals);
  const { siteId = '', orbitId = '' } = params;
  return exportTrajectoryCsv(locals.db, { studyId, siteId, orbitId });
}) satisfies APIRoute;

import type { APIRoute } from 'astro';
import { exportTrajectoryGeoJson } from '#server/ascents/export-geojson.ts';
import { endpoint } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';

export const GET = endpoint(({ locals, params }) => {
  const { studyId } = requireMember(locals);
  const { siteId = '', orbitId = '' } = params;
  return exportTrajectoryGeoJson(locals.db, { studyId, siteId, orbitId });
}) satisfies APIRoute;

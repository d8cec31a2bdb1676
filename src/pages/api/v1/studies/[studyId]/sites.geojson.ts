import type { APIRoute } from 'astro';
import { endpoint } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { exportGeoJson } from '#server/sites/export-geojson.ts';

export const GET = endpoint(({ locals }) => {
  const { studyId } = requireMember(locals);
  return exportGeoJson(locals.db, { studyId });
}) satisfies APIRoute;

import type { APIRoute } from 'astro';
import { SiteInput, SiteListQuery } from '#contract/site.ts';
import { endpoint, json, readJson, readQuery, versioned } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { addSite } from '#server/sites/add-site.ts';
import { readSites } from '#server/sites/read-sites.ts';

export const GET = endpoint(async ({ locals, url }) => {
  const { studyId } = requireMember(locals);
  return json(await readSites(locals.db, { studyId, ...readQuery(url, SiteListQuery) }));
}) satisfies APIRoute;

export const POST = endpoint(async ({ locals, request }) => {
  const member = requireMember(locals, 'input');
  const input = await readJson(request, SiteInput);
  return versioned(await addSite(locals.db, { member, input }), 201);
}) satisfies APIRoute;

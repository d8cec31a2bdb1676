import type { APIRoute } from 'astro';
import { SitesRestoration } from '#contract/site.ts';
import { endpoint, json, readJson } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { restoreSites } from '#server/sites/restore-sites.ts';

export const POST = endpoint(async ({ locals, request }) => {
  const member = requireMember(locals, 'input');
  const { siteIds } = await readJson(request, SitesRestoration);
  return json(await restoreSites(locals.db, { member, siteIds }));
}) satisfies APIRoute;

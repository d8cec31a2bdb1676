import type { APIRoute } from 'astro';
import { SitesRemoval } from '#contract/site.ts';
import { endpoint, json, readJson } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { removeSites } from '#server/sites/remove-sites.ts';

export const POST = endpoint(async ({ locals, request }) => {
  const member = requireMember(locals, 'input');
  const removal = await readJson(request, SitesRemoval);
  return json(await removeSites(locals.db, { member, removal }));
}) satisfies APIRoute;

import type { APIContext, APIRoute } from 'astro';
import { SitePatch } from '#contract/site.ts';
import { baseVersion, endpoint, json, readJson, versioned } from '#server/endpoint.ts';
import { notFound } from '#server/errors.ts';
import { requireMember } from '#server/member.ts';
import { changeSite } from '#server/sites/change-site.ts';
import { readSite } from '#server/sites/read-sites.ts';
import { removeSites } from '#server/sites/remove-sites.ts';

function siteIdOf({ params }: APIContext): string {
  if (!params.siteId) throw notFound();
  return params.siteId;
}

export const GET = endpoint(async (context) => {
  const { studyId } = requireMember(context.locals);
  return versioned(await readSite(context.locals.db, { studyId, siteId: siteIdOf(context) }));
}) satisfies APIRoute;

export const PATCH = endpoint(async (context) => {
  const { locals, request } = context;
  const member = requireMember(locals, 'input');
  const patch = await readJson(request, SitePatch);
  const version = baseVersion(request, patch.version);
  return versioned(await changeSite(locals.db, { member, siteId: siteIdOf(context), version, patch }));
}) satisfies APIRoute;

export const DELETE = endpoint(async (context) => {
  const { locals, request } = context;
  const member = requireMember(locals, 'input');
  const sites = [{ id: siteIdOf(context), version: baseVersion(request) }];
  return json(await removeSites(locals.db, { member, removal: { sites } }));
}) satisfies APIRoute;

import type { APIRoute } from 'astro';
import { SettingsPatch } from '#contract/requirement.ts';
import { baseVersion, endpoint, readJson, versioned } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { changeSettings } from '#server/requirement/change-settings.ts';
import { readSettings } from '#server/requirement/read-requirement.ts';

export const GET = endpoint(async ({ locals }) => {
  const { studyId } = requireMember(locals);
  return versioned(await readSettings(locals.db, { studyId }));
}) satisfies APIRoute;

export const PATCH = endpoint(async ({ locals, request }) => {
  const member = requireMember(locals, 'input');
  const patch = await readJson(request, SettingsPatch);
  const version = baseVersion(request, patch.version);
  return versioned(await changeSettings(locals.db, { member, version, patch }));
}) satisfies APIRoute;

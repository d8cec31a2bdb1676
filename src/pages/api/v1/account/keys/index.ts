import type { APIRoute } from 'astro';
import { PersonalKeyInput } from '#contract/account.ts';
import { makeKey, readKeys } from '#server/account/keys.ts';
import { endpoint, json, readJson } from '#server/endpoint.ts';
import { requireUser } from '#server/member.ts';

export const GET = endpoint(async ({ locals }) =>
  json(await readKeys(locals.db, requireUser(locals).userId)),
) satisfies APIRoute;

export const POST = endpoint(async ({ locals, request }) => {
  const { name } = await readJson(request, PersonalKeyInput);
  return json(await makeKey(locals.db, requireUser(locals), name), { status: 201 });
}) satisfies APIRoute;

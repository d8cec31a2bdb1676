import type { APIRoute } from 'astro';
import { AccountPatch } from '#contract/account.ts';
import { changeName, readAccount } from '#server/account/profile.ts';
import { baseVersion, endpoint, readJson, versioned } from '#server/endpoint.ts';
import { requireUser } from '#server/member.ts';

export const GET = endpoint(async ({ locals }) =>
  versioned(await readAccount(locals.db, requireUser(locals).userId)),
) satisfies APIRoute;

export const PATCH = endpoint(async ({ locals, request }) => {
  const { name, version } = await readJson(request, AccountPatch);
  const base = baseVersion(request, version);
  const { userId } = requireUser(locals);
  return versioned(await changeName(locals.db, { userId, version: base, name }));
}) satisfies APIRoute;

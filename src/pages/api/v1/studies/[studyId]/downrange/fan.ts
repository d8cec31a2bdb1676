import type { APIRoute } from 'astro';
import { FanQuery } from '#contract/downrange.ts';
import { fanTask } from '#server/downrange/ask.ts';
import { respondWithDownrange } from '#server/downrange/respond.ts';
import { endpoint, readQuery } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';

export const GET = endpoint(async ({ locals, url }) => {
  const { studyId } = requireMember(locals);
  const query = readQuery(url, FanQuery);
  return respondWithDownrange(await fanTask(locals.db, { studyId, query }));
}) satisfies APIRoute;

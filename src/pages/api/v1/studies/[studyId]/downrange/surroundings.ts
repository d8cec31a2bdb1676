import type { APIRoute } from 'astro';
import { SurroundingsQuery } from '#contract/downrange.ts';
import { surroundingsTask } from '#server/downrange/ask.ts';
import { respondWithDownrange } from '#server/downrange/respond.ts';
import { endpoint, readQuery } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';

export const GET = endpoint(async ({ locals, url }) => {
  const { studyId } = requireMember(locals);
  const query = readQuery(url, SurroundingsQuery);
  return respondWithDownrange(await surroundingsTask(locals.db, { studyId, query }));
}) satisfies APIRoute;

import type { APIRoute } from 'astro';
import { StudyCorridorQuery } from '#contract/downrange.ts';
import { corridorTask } from '#server/downrange/ask.ts';
import { respondWithDownrange } from '#server/downrange/respond.ts';
import { endpoint, readQuery } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';

export const GET = endpoint(async ({ locals, url }) => {
  const { studyId } = requireMember(locals);
  const query = readQuery(url, StudyCorridorQuery);
  return respondWithDownrange(await corridorTask(locals.db, { studyId, query }));
}) satisfies APIRoute;

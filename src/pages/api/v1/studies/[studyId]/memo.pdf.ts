import type { APIRoute } from 'astro';
import { MemoQuery } from '#contract/memo.ts';
import { endpoint, readQuery } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { respondWithMemo } from '#server/memo/respond.ts';

export const GET = endpoint(({ locals, url }) => {
  const { studyId, userId } = requireMember(locals);
  const { paper } = readQuery(url, MemoQuery);
  return respondWithMemo(locals.db, { studyId, userId, paper, now: new Date() });
}) satisfies APIRoute;

import type { APIRoute } from 'astro';
import { RankingQuery } from '#contract/ranking.ts';
import { endpoint, json, readQuery } from '#server/endpoint.ts';
import { requireMember } from '#server/member.ts';
import { readFigures, readRanking } from '#server/ranking/read-ranking.ts';

export const GET = endpoint(async ({ locals, url }) => {
  const { studyId, userId } = requireMember(locals);
  const { weights, form } = readQuery(url, RankingQuery);
  return json(
    form === 'figures'
      ? await readFigures(locals.db, { studyId, userId })
      : await readRanking(locals.db, { studyId, userId, weights }),
  );
}) satisfies APIRoute;

import type { APIRoute } from 'astro';
import { StudyInput, StudyListQuery } from '#contract/study.ts';
import { endpoint, json, readJson, readQuery, versioned } from '#server/endpoint.ts';
import { requireUser } from '#server/member.ts';
import { createStudy } from '#server/studies/create-study.ts';
import { listStudies } from '#server/studies/read-studies.ts';

export const GET = endpoint(async ({ locals, url }) => {
  const { userId } = requireUser(locals);
  return json(await listStudies(locals.db, { userId, ...readQuery(url, StudyListQuery) }));
}) satisfies APIRoute;

export const POST = endpoint(async ({ locals, request }) => {
  const maker = requireUser(locals);
  const input = await readJson(request, StudyInput);
  return versioned(await createStudy(locals.db, { maker, input }), 201);
}) satisfies APIRoute;

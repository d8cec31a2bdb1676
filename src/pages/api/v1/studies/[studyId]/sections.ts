import type { APIRoute } from 'astro';
import type { StudySections } from '#contract/sections.ts';
import { endpoint, json } from '#server/endpoint.ts';
import { loadFrame } from '#server/studies/frame.ts';

export const GET = endpoint(async ({ locals }) => {
  const { study, sections } = await loadFrame(locals);
  return json({ revision: study.revision, savedAt: study.savedAt, sections } satisfies StudySections);
}) satisfies APIRoute;

import type { APIRoute } from 'astro';
import { endpoint, json } from '#server/endpoint.ts';
import { checkHealth } from '#server/health.ts';

export const GET = endpoint(async () => {
  const health = await checkHealth();
  return json(health, { status: health.status === 'ok' ? 200 : 503 });
}) satisfies APIRoute;

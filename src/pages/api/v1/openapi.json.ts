import type { APIRoute } from 'astro';
import { openApiDocument } from '#contract/openapi/document.ts';
import { endpoint, json } from '#server/endpoint.ts';
import { env, publicOrigin } from '#server/env.ts';

export const GET = endpoint(() => json(openApiDocument(publicOrigin(env())))) satisfies APIRoute;

import { randomBytes } from 'node:crypto';
import type { APIContext } from 'astro';
import { defineMiddleware } from 'astro:middleware';
import { findMembership } from '#db/queries/membership.ts';
import { decide, ruleOf, rulesOf } from '#server/access.ts';
import { whoAsks } from '#server/auth/actor.ts';
import { database } from '#server/database.ts';
import { databaseAway, problem } from '#server/endpoint.ts';
import { allowedOrigins, env } from '#server/env.ts';
import { AppError, notFound } from '#server/errors.ts';

const SAFE_METHODS = new Set(['GET', 'HEAD', 'OPTIONS']);
const UUID = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/i;
const isApi = (context: APIContext): boolean => context.url.pathname.startsWith('/api/');

/** Another site may not write with the visitor's cookie; a personal key is not sent by browsers on their own. */
function fromElsewhere({ request }: APIContext): boolean {
  if (SAFE_METHODS.has(request.method) || request.headers.has('authorization')) return false;
  const origin = request.headers.get('origin');
  if (origin) return !allowedOrigins(env()).includes(origin);
  return request.headers.has('cookie') || request.headers.get('sec-fetch-site') === 'cross-site';
}

function refuse(context: APIContext, error: AppError): Response {
  if (isApi(context)) return problem(error, context.locals.requestId);
  if (error.code === 'signed-out') {
    const next = encodeURIComponent(context.url.pathname + context.url.search);
    return context.redirect(`/sign-in?next=${next}`);
  }
  // An empty body with 404 has Astro draw src/pages/404.astro in its place.
  return error.code === 'not-found'
    ? new Response(null, { status: 404 })
    : new Response(error.message, { status: error.status });
}

async function identify(context: APIContext): Promise<void> {
  const { locals, params, request } = context;
  locals.user = await whoAsks(locals.db, request.headers);
  const studyId = params['studyId'];
  if (!locals.user || !studyId || !UUID.test(studyId)) return;
  const { userId, name } = locals.user;
  const found = await findMembership(locals.db, { studyId, userId });
  if (found) locals.member = { memberId: found.id, studyId, userId, name, role: found.role };
}

/** @throws AppError where the request may not go on */
async function check(context: APIContext): Promise<void> {
  const { locals, request } = context;
  const rules = rulesOf(context.routePattern);
  const rule = ruleOf(context.routePattern, request.method);
  if (rules && !rule)
    throw new AppError('method-not-allowed', `${request.method} does not exist at this address.`, {
      headers: { allow: Object.keys(rules).join(', ') },
    });
  if (fromElsewhere(context)) throw new AppError('wrong-origin', 'The request came from another site.');
  if (rule !== 'public' || !isApi(context)) await identify(context);
  const malformed = Object.entries(context.params).some(
    ([name, value]) => name.endsWith('Id') && name !== 'userId' && !UUID.test(value ?? ''),
  );
  const decision = decide(rule, locals.user, locals.member?.role ?? null);
  if (decision === 'signed-out') throw new AppError('signed-out', 'Sign in first, or send a personal key.');
  if (decision === 'not-found' || malformed) throw notFound();
  if (decision === 'forbidden')
    throw new AppError('forbidden', 'Your role in this study does not allow that. Nothing was changed.');
}

export const onRequest = defineMiddleware(async (context, next) => {
  const { locals } = context;
  locals.requestId = randomBytes(8).toString('hex');
  locals.nonce = randomBytes(16).toString('base64');
  locals.user = null;
  locals.member = null;
  locals.db = database();
  const started = performance.now();
  try {
    await check(context);
  } catch (error) {
    if (error instanceof AppError) return refuse(context, error);
    if (!databaseAway(error)) throw error;
    return refuse(
      context,
      new AppError('unavailable', 'The database does not answer. Try again in a moment.'),
    );
  }
  const response = await next();
  response.headers.set('x-request-id', locals.requestId);
  response.headers.append('server-timing', `app;dur=${(performance.now() - started).toFixed(1)}`);
  if (!response.headers.has('cache-control')) response.headers.set('cache-control', 'no-store');
  return response;
});

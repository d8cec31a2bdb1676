import type { APIContext } from 'astro';
import { z } from 'zod';
import { AppError, type FieldError } from '#server/errors.ts';
import { logError } from '#server/log.ts';
import { storable } from '#server/storable.ts';

/** An answer as RFC 9457 problem details. */
export function problem(error: AppError, requestId?: string): Response {
  const body = {
    type: 'about:blank',
    title: error.message,
    status: error.status,
    code: error.code,
    ...(error.errors ? { errors: error.errors } : {}),
    ...(error.current === undefined ? {} : { current: error.current }),
    ...(requestId ? { requestId } : {}),
  };
  return new Response(JSON.stringify(body), {
    status: error.status,
    headers: { 'content-type': 'application/problem+json', 'cache-control': 'no-store', ...error.headers },
  });
}

/** Zod's issues as dotted paths with words. */
export function fieldErrors(error: z.ZodError): FieldError[] {
  return error.issues.map((issue) => ({ path: issue.path.map(String).join('.'), message: issue.message }));
}

function toAppError(error: unknown, requestId: string): AppError {
  if (error instanceof AppError) return error;
  if (error instanceof z.ZodError)
    return new AppError('invalid', 'Some of the input does not fit. Nothing was saved.', {
      errors: fieldErrors(error),
    });
  logError({ requestId, error: String(error), stack: (error as Error)?.stack ?? '' });
  return databaseAway(error)
    ? new AppError('unavailable', 'The database does not answer. Nothing was saved; try again in a moment.')
    : new AppError('internal', 'Something failed on the server. Nothing was saved.');
}

/** Connection failures and shutdowns, by Node's codes and SQLSTATE classes 08 and 57. */
export function databaseAway(error: unknown): boolean {
  for (let e: unknown = error; e instanceof Error; e = e.cause) {
    const code = (e as { code?: string }).code ?? '';
    if (
      /^(ECONN|EPIPE|ETIMEDOUT|08|57P)/.test(code) ||
      /Connection terminated|timeout exceeded|not queryable/.test(e.message)
    )
      return true;
  }
  return false;
}

/** Wraps a route: the only place where errors become answers. */
export function endpoint(handle: (context: APIContext) => Promise<Response> | Response) {
  return async (context: APIContext): Promise<Response> => {
    try {
      return await handle(context);
    } catch (error) {
      return problem(toAppError(error, context.locals.requestId), context.locals.requestId);
    }
  };
}

export function json(
  body: unknown,
  init: { status?: number; headers?: Record<string, string> } = {},
): Response {
  return new Response(JSON.stringify(body), {
    status: init.status ?? 200,
    headers: { 'content-type': 'application/json', 'cache-control': 'no-store', ...init.headers },
  });
}

/** A JSON answer of one versioned object, with its ETag. */
export function versioned<T extends { version: number }>(body: T, status = 200): Response {
  return json(body, { status, headers: { etag: `"${body.version}"` } });
}

export const noContent = (): Response => new Response(null, { status: 204 });

const MAX_JSON_BYTES = 32 * 1024 * 1024;

/** Reads and checks a JSON body, once. @throws AppError 'malformed-json' · 'too-large', ZodError */
export async function readJson<T extends z.ZodType>(request: Request, schema: T): Promise<z.output<T>> {
  if (Number(request.headers.get('content-length') ?? 0) > MAX_JSON_BYTES)
    throw new AppError('too-large', 'The request is larger than 32 MB. Nothing was read.');
  let [text, body]: [string, unknown] = ['', null];
  try {
    text = await request.text();
    body = JSON.parse(text);
  } catch (cause) {
    throw new AppError('malformed-json', 'The body is not JSON. Nothing was saved.', { cause });
  }
  const input = schema.parse(body);
  // JSON as it travels writes what cannot be kept as an escape, never as it is.
  return text.includes('\\u') ? storable(input) : input;
}

/** Reads and checks what the address asks for; a parameter left empty is one left out. @throws AppError, ZodError */
export const readQuery = <T extends z.ZodType>(url: URL, schema: T): z.output<T> =>
  storable(schema.parse(Object.fromEntries([...url.searchParams].filter(([, value]) => value !== ''))));

/**
 * The version a write is based on: `If-Match` with the ETag, or `version` in the body.
 * @throws AppError 'version-required' where there is neither
 */
export function baseVersion(request: Request, bodyVersion?: number): number {
  const match = /^(?:W\/)?"(\d+)"$/.exec(request.headers.get('if-match')?.trim() ?? '');
  const version = match ? Number(match[1]) : bodyVersion;
  if (version === undefined)
    throw new AppError(
      'version-required',
      'Say which version this change is based on: If-Match with the ETag, or version in the body.',
    );
  return version;
}

import type { APIRoute } from 'astro';
import { endpoint } from '#server/endpoint.ts';
import { handleAuth } from '#server/auth/handle.ts';

/** Sign-in, sign-out, passwords and links: better-auth's addresses. */
export const ALL = endpoint(({ request, clientAddress, locals }) =>
  handleAuth({ db: locals.db, request, clientAddress, requestId: locals.requestId }),
) satisfies APIRoute;

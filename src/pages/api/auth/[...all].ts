import type { APIRoute } from 'astro';
import { auth } from '#server/auth/auth.ts';

/** The address that counts for the rate limit is the connection's, never one of the client's own making. */
export const ALL: APIRoute = ({ request, clientAddress }) => {
  const headers = new Headers(request.headers);
  headers.set('x-client-ip', clientAddress);
  return auth().handler(new Request(request, { headers }));
};

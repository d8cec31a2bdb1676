import type { PooledDb } from '#db/client.ts';
import { problem } from '#server/endpoint.ts';
import { AppError } from '#server/errors.ts';
import { refusalOf } from './answer.ts';
import { bookAttempt, forgiveAttempt } from './attempts.ts';
import { auth } from './auth.ts';

const SIGN_IN = '/api/auth/sign-in/email';

interface Incoming {
  db: PooledDb;
  request: Request;
  /** The connection's address, never one of the client's own making. */
  clientAddress: string;
  requestId: string;
}

function addressIn(body: string): string | undefined {
  try {
    const { email } = JSON.parse(body) as { email?: unknown };
    return typeof email === 'string' ? email.trim().toLowerCase().slice(0, 254) : undefined;
  } catch {
    return undefined;
  }
}

/** Signs in; a failed attempt stays booked against the account, one that the address's limit refused does not. */
async function signIn(db: PooledDb, request: Request): Promise<Response> {
  const body = await request.text();
  const email = addressIn(body);
  const forward = new Request(request.url, { method: 'POST', headers: request.headers, body });
  if (!email) return auth().handler(forward);
  const booking = await bookAttempt(db, { email, now: new Date() });
  const response = await auth().handler(forward);
  if (response.ok || response.status === 429) await forgiveAttempt(db, booking);
  return response;
}

/** Everything under /api/auth: the library's handler with the limits of this product and its form of refusal. */
export async function handleAuth({ db, request, clientAddress, requestId }: Incoming): Promise<Response> {
  const headers = new Headers(request.headers);
  headers.set('x-client-ip', clientAddress);
  const incoming = new Request(request, { headers });
  const isSignIn = request.method === 'POST' && new URL(request.url).pathname === SIGN_IN;
  try {
    const response = isSignIn ? await signIn(db, incoming) : await auth().handler(incoming);
    if (response.status < 400) return response;
    return problem(await refusalOf(response), requestId);
  } catch (error) {
    if (error instanceof AppError) return problem(error, requestId);
    throw error;
  }
}

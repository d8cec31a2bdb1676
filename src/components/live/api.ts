/** How islands speak with the server: same-origin JSON, problem details as typed errors. */

interface FieldProblem {
  path: string;
  message: string;
}

interface Problem {
  title?: string;
  detail?: string;
  code?: string;
  errors?: FieldProblem[];
  current?: unknown;
  requestId?: string;
}

/** A refused or failed request. `message` is written for the person. */
export class ApiError extends Error {
  readonly status: number;
  /** The server's word for it: "stale", "study-locked", "offline" when there was no answer. */
  readonly code: string;
  readonly errors: readonly FieldProblem[];
  /** With a stale write: what the server holds now. */
  readonly current: unknown;
  readonly requestId: string | undefined;

  constructor(status: number, problem: Problem, options?: ErrorOptions) {
    super(problem.detail ?? problem.title ?? `The server answered ${status}.`, options);
    this.name = 'ApiError';
    this.status = status;
    this.code = problem.code ?? `http-${status}`;
    this.errors = problem.errors ?? [];
    this.current = problem.current;
    this.requestId = problem.requestId;
  }
}

async function readProblem(response: Response): Promise<Problem> {
  if (!response.headers.get('content-type')?.includes('json')) return {};
  try {
    return (await response.json()) as Problem;
  } catch {
    return {};
  }
}

async function answerOf(request: Promise<Response>): Promise<Response> {
  let response: Response;
  try {
    response = await request;
  } catch (cause) {
    if (cause instanceof DOMException && cause.name === 'AbortError') throw cause;
    throw new ApiError(
      0,
      {
        code: 'offline',
        detail: 'The server could not be reached. Nothing was saved; what you typed is still here.',
      },
      { cause },
    );
  }
  if (response.ok) return response;
  const problem = await readProblem(response);
  const requestId = problem.requestId ?? response.headers.get('x-request-id') ?? undefined;
  throw new ApiError(response.status, { ...problem, ...(requestId ? { requestId } : {}) });
}

async function bodyOf<T>(response: Response): Promise<T> {
  return (response.status === 204 ? undefined : await response.json()) as T;
}

/** GET; the type is the contract's view type of that address. */
export async function apiFetch<T>(address: string, signal?: AbortSignal): Promise<T> {
  const headers = { accept: 'application/json' };
  return bodyOf<T>(await answerOf(fetch(address, { headers, ...(signal ? { signal } : {}) })));
}

interface SendOptions {
  /** The ETag of what is changed, where the version is not in the body. */
  ifMatch?: string;
  signal?: AbortSignal;
}

/** POST, PUT, PATCH or DELETE with a JSON body, or a form with a file. */
export async function send<T = void>(
  method: 'POST' | 'PUT' | 'PATCH' | 'DELETE',
  address: string,
  body?: unknown,
  options: SendOptions = {},
): Promise<T> {
  const isForm = body instanceof FormData;
  const headers: Record<string, string> = { accept: 'application/json' };
  if (body !== undefined && !isForm) headers['content-type'] = 'application/json';
  if (options.ifMatch) headers['if-match'] = options.ifMatch;
  const request: RequestInit = { method, headers };
  if (body !== undefined) request.body = isForm ? body : JSON.stringify(body);
  if (options.signal) request.signal = options.signal;
  return bodyOf<T>(await answerOf(fetch(address, request)));
}

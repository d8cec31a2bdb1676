/** Every code an answer can carry, with its HTTP status: an error without a status cannot be thrown. */
export const ERROR_STATUS = {
  'malformed-json': 400,
  'signed-out': 401,
  'sign-in-failed': 401,
  forbidden: 403,
  'wrong-origin': 403,
  'not-found': 404,
  'method-not-allowed': 405,
  stale: 409,
  'study-locked': 409,
  'study-archived': 409,
  conflict: 409,
  gone: 410,
  'too-large': 413,
  invalid: 422,
  'version-required': 428,
  'too-many-requests': 429,
  internal: 500,
  unavailable: 503,
} as const;

export type ErrorCode = keyof typeof ERROR_STATUS;

/** One field at fault; `path` is dotted, as in the request's body. */
export interface FieldError {
  path: string;
  message: string;
}

interface AppErrorOptions {
  cause?: unknown;
  /** Fields at fault, for input that does not fit. */
  errors?: FieldError[];
  /** The present state of what a stale write meant to change. */
  current?: unknown;
  headers?: Record<string, string>;
}

/** An error meant for the person: the message says what happened, what was kept and what to do. */
export class AppError extends Error {
  readonly errors: FieldError[] | undefined;
  readonly current: unknown;
  readonly headers: Record<string, string>;

  constructor(
    readonly code: ErrorCode,
    message: string,
    options: AppErrorOptions = {},
  ) {
    super(message, { cause: options.cause });
    this.name = 'AppError';
    this.errors = options.errors;
    this.current = options.current;
    this.headers = options.headers ?? {};
  }

  get status(): number {
    return ERROR_STATUS[this.code];
  }
}

export const notFound = (what = 'There is nothing at this address.'): AppError =>
  new AppError('not-found', what);

/** A write that was based on a version that is no longer the newest. */
export const stale = (current: unknown): AppError =>
  new AppError('stale', 'This was changed by someone else meanwhile. Nothing of yours was saved.', {
    current,
  });

import { AppError, type ErrorCode } from '#server/errors.ts';
import { tooManyRequests } from './attempts.ts';

/** What the sign-in library says, in this product's words. */
const WORDS: Record<string, [ErrorCode, string]> = {
  INVALID_EMAIL_OR_PASSWORD: ['sign-in-failed', 'Address and password do not go together. Check both.'],
  INVALID_EMAIL: ['invalid', 'This is no mail address.'],
  EMAIL_NOT_VERIFIED: [
    'forbidden',
    'This address is not confirmed yet. A new link to confirm it was sent there.',
  ],
  ACCOUNT_DEACTIVATED: ['forbidden', 'This account is deactivated. An administrator can activate it again.'],
  INVALID_PASSWORD: ['invalid', 'The present password is another one. Nothing was changed.'],
  PASSWORD_TOO_SHORT: ['invalid', 'A password has at least 10 characters.'],
  PASSWORD_TOO_LONG: ['invalid', 'A password has up to 128 characters.'],
  INVALID_TOKEN: ['gone', 'The link is used up or out of date. Ask for a new one.'],
  EMAIL_PASSWORD_SIGN_UP_DISABLED: [
    'forbidden',
    'Accounts are made by invitation. Ask an administrator for one.',
  ],
};

/** The library's refusal as an AppError, so that this address answers in problem details like all others. */
export async function refusalOf(response: Response): Promise<AppError> {
  const body: unknown = await response.json().catch(() => null);
  const code = typeof body === 'object' && body && 'code' in body ? String(body.code) : '';
  if (response.status === 429) return tooManyRequests(Number(response.headers.get('x-retry-after') ?? 60));
  const known = Object.hasOwn(WORDS, code) ? WORDS[code] : undefined;
  if (known) return new AppError(known[0], known[1]);
  if (response.status === 401) return new AppError('signed-out', 'Sign in first.');
  if (response.status === 403) return new AppError('wrong-origin', 'The request came from another site.');
  if (response.status === 404) return new AppError('not-found', 'There is nothing at this address.');
  if (response.status < 500)
    return new AppError('invalid', 'Some of the input does not fit. Nothing was saved.');
  return new AppError('internal', 'Something failed on the server. Nothing was saved.');
}

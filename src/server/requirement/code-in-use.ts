import { AppError } from '#server/errors.ts';

/** Orbits go by their codes in exports and in answers, so a manifest has each once. */
export function codeInUse(code: string): AppError {
  const message = `Another orbit of the manifest has the code ${code}. Give this one another.`;
  return new AppError('invalid', message, { errors: [{ path: 'code', message }] });
}

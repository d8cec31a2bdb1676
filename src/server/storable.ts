import { AppError, type FieldError } from '#server/errors.ts';

/**
 * Lets input through whose texts can be kept. The database keeps no NUL in a text, and neither NUL nor half a surrogate
 * pair in JSON.
 * @param input checked already, so that it is no deeper than its schema
 * @throws AppError 'invalid' with every text at fault by its path
 * @see PostgreSQL documentation, 8.3 and 8.14.1 [from memory]
 */
export function storable<T>(input: T): T {
  const errors = faultsIn(input, '');
  if (errors.length === 0) return input;
  throw new AppError('invalid', 'A text holds a character that cannot be kept. Nothing was saved.', {
    errors,
  });
}

function faultsIn(input: unknown, path: string): FieldError[] {
  if (typeof input === 'string')
    return isStorable(input) ? [] : [{ path, message: 'This holds a character that cannot be kept.' }];
  if (typeof input !== 'object' || input === null) return [];
  return Object.entries(input).flatMap(([key, value]) => faultsIn(value, path ? `${path}.${key}` : key));
}

const isStorable = (text: string): boolean => !text.includes('\0') && !/\p{Cs}/u.test(text);

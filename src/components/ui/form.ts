import { zodResolver } from '@hookform/resolvers/zod';
import { useForm, type DefaultValues, type FieldErrors, type FieldValues, type Path } from 'react-hook-form';
import type { z } from 'zod';
import { readTypedNumber } from '#contract/format.ts';
import type { ApiError } from '#components/live/api.ts';
import type { SummaryLine } from './ErrorSummary.tsx';

/** A form checked by a contract's schema: on leaving a field and on submit, never while typing. */
export function useContractForm<Input extends FieldValues, Output extends FieldValues>(
  schema: z.ZodType<Output, Input>,
  defaultValues: DefaultValues<Input>,
) {
  return useForm<Input, unknown, Output>({
    resolver: zodResolver(schema),
    defaultValues,
    mode: 'onBlur',
    reValidateMode: 'onBlur',
  });
}

/** `register('perigeeKm', asTypedNumber)`: the schema gets a number, or the text that is none. */
export const asTypedNumber = {
  setValueAs: (value: unknown) => (typeof value === 'string' ? readTypedNumber(value) : value),
};

/**
 * Puts the server's refusals beside their fields.
 * @returns true when at least one has a field here; otherwise the form says it as a whole
 */
export function showServerErrors<Values extends FieldValues>(
  error: ApiError,
  fields: readonly Path<Values>[],
  setError: (field: Path<Values>, error: { message: string }) => void,
): boolean {
  const placed = error.errors.filter((one) => fields.some((field) => field === one.path));
  for (const one of placed) setError(one.path as Path<Values>, { message: one.message });
  return placed.length > 0;
}

/** The lines of an ErrorSummary: for forms whose fields carry `id={prefix + name}`. */
export function summaryLines(errors: FieldErrors, prefix = ''): SummaryLine[] {
  const lines: SummaryLine[] = [];
  const walk = (node: unknown, path: string) => {
    if (typeof node !== 'object' || node === null) return;
    if ('message' in node && typeof node.message === 'string') {
      lines.push({ fieldId: prefix + path, message: node.message });
      return;
    }
    for (const [key, child] of Object.entries(node)) {
      if (key !== 'ref') walk(child, path ? `${path}.${key}` : key);
    }
  };
  walk(errors, '');
  return lines;
}

import { useEffect, useRef } from 'react';
import type { FieldValues, Path, PathValue, UseFormReturn } from 'react-hook-form';

/**
 * Brings newly saved values into a form, field by field; a field that is being edited (it differs from what was
 * saved before) keeps what is typed, unless `force` goes up: then the saved values win.
 */
export function useKeptValues<V extends FieldValues, O extends FieldValues>(
  form: Pick<UseFormReturn<V, unknown, O>, 'getValues' | 'setValue' | 'clearErrors'>,
  kept: V,
  force: number,
): void {
  const last = useRef({ kept, force });
  useEffect(() => {
    const before = last.current;
    last.current = { kept, force };
    if (before.kept === kept && before.force === force) return;
    for (const name of Object.keys(kept) as Path<V>[]) {
      const value = kept[name] as PathValue<V, Path<V>>;
      const untouched = JSON.stringify(form.getValues(name)) === JSON.stringify(before.kept[name]);
      if (!untouched && before.force === force) continue;
      form.setValue(name, value);
      form.clearErrors(name);
    }
  }, [form, kept, force]);
}

import { useCallback, useEffect, useRef } from 'react';
import type { FieldValues, Path, PathValue, UseFormReturn } from 'react-hook-form';

const same = (a: unknown, b: unknown): boolean => JSON.stringify(a) === JSON.stringify(b);

/**
 * Brings saved values into a form, field by field. A field that is being edited keeps what is typed, unless `force`
 * goes up: then the saved values win.
 * @returns the values each field was last equal to: what an edit under way is based on
 */
export function useKeptValues<V extends FieldValues, O extends FieldValues>(
  form: Pick<UseFormReturn<V, unknown, O>, 'getValues' | 'setValue' | 'clearErrors'>,
  kept: V,
  force: number,
): () => V {
  const basedOn = useRef(kept);
  const forced = useRef(force);
  useEffect(() => {
    const wins = forced.current !== force;
    forced.current = force;
    const next = { ...basedOn.current };
    for (const name of Object.keys(kept) as Path<V>[]) {
      const typed: unknown = form.getValues(name);
      if (!wins && !same(typed, basedOn.current[name]) && !same(typed, kept[name])) continue;
      next[name] = kept[name];
      if (same(typed, kept[name])) continue;
      form.setValue(name, kept[name] as PathValue<V, Path<V>>);
      form.clearErrors(name);
    }
    basedOn.current = next;
  }, [form, kept, force]);
  return useCallback(() => basedOn.current, []);
}

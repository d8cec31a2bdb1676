import type { UseFormReturn } from 'react-hook-form';
import { ORBIT_FIELDS, readOrbit, type OrbitFields } from './orbit-form.ts';

/**
 * Checks the whole orbit and says what is wrong beside its fields.
 * @param reached the fields that were left so far, where the others are to be left alone yet
 * @returns the checked orbit, or null
 */
export function checkForm(form: UseFormReturn<OrbitFields>, reached?: ReadonlySet<keyof OrbitFields>) {
  const result = readOrbit(form.getValues());
  for (const field of ORBIT_FIELDS) {
    const message = result.error?.issues.find(({ path }) => path[0] === field)?.message;
    if (message === undefined) form.clearErrors(field);
    else if (!reached || reached.has(field)) form.setError(field, { message });
  }
  return result.success ? result.data : null;
}

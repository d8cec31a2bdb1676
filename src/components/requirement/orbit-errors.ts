import type { UseFormReturn } from 'react-hook-form';
import { ORBIT_FIELDS, readOrbit, type OrbitFields } from './orbit-form.ts';

/**
 * Checks the whole orbit and says what is wrong beside its fields. A field not reached yet is only marked on
 * submitting; `touched` leaves those alone.
 * @returns the checked orbit, or null
 */
export function checkForm(form: UseFormReturn<OrbitFields>, which: 'touched' | 'all') {
  const result = readOrbit(form.getValues());
  const { touchedFields } = form.formState;
  for (const field of ORBIT_FIELDS) {
    const message = result.error?.issues.find(({ path }) => path[0] === field)?.message;
    if (message === undefined) form.clearErrors(field);
    else if (which === 'all' || touchedFields[field]) form.setError(field, { message });
  }
  return result.success ? result.data : null;
}

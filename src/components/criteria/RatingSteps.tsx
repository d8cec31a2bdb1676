import type { UseFormRegisterReturn } from 'react-hook-form';
import { TextField, type FieldError } from '#components/ui/index.ts';
import { RATING_STEPS } from '#contract/criterion.ts';

const STEPS = Array.from({ length: RATING_STEPS }, (_, step) => step);

interface StepsProps {
  /** Puts a step's name into its form: what `register('steps.0')` gives for step 0. */
  fieldOf: (step: number) => UseFormRegisterReturn;
  errorOf: (step: number) => FieldError;
  /** Whether step 0 is the worst. */
  worstFirst: boolean;
}

/** The five named steps of a rating. */
export function RatingSteps({ fieldOf, errorOf, worstFirst }: StepsProps) {
  const ends: Readonly<Record<number, string>> = worstFirst
    ? { 0: ', worst', [RATING_STEPS - 1]: ', best' }
    : { 0: ', best', [RATING_STEPS - 1]: ', worst' };
  return (
    <fieldset className="cr-steps cr-wide">
      <legend className="fld-label">Steps</legend>
      {STEPS.map((step) => (
        <TextField
          key={step}
          label={`Step ${step}${ends[step] ?? ''}`}
          error={errorOf(step)}
          {...fieldOf(step)}
        />
      ))}
    </fieldset>
  );
}

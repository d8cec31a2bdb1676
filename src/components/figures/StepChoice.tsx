import { useId, type KeyboardEvent } from 'react';
import type { Criterion } from '#contract/criterion.ts';

interface StepChoiceProps {
  name: string;
  criterion: Criterion;
  /** The step chosen, "0" to "4"; empty for none. */
  value: string;
  describedBy: string;
  onChange: (value: string) => void;
  /** A step chosen for good: by pointer, or by typing its number. */
  onPick: (value: string) => void;
}

/** A rating's five steps and none of them: arrows choose, a digit picks. */
export function StepChoice({ name, criterion, value, describedBy, onChange, onPick }: StepChoiceProps) {
  const group = useId();
  const steps = criterion.steps ?? [];
  const choices = [
    ...steps.map((step, at) => ({ value: String(at), step })),
    { value: '', step: 'No figure' },
  ];
  const press = (event: KeyboardEvent): void => {
    if (steps[Number(event.key)] === undefined || !/^\d$/.test(event.key)) return;
    event.preventDefault();
    onPick(event.key);
  };
  return (
    <fieldset className="fig-steps" aria-describedby={describedBy}>
      <legend className="sr-only">{name}</legend>
      {choices.map((choice) => (
        <label key={choice.value}>
          <input
            type="radio"
            onKeyDown={press}
            name={group}
            value={choice.value}
            checked={choice.value === value}
            onChange={() => onChange(choice.value)}
            onClick={(event) => {
              // A key that moves the choice clicks too; only a pointer's click is meant for good.
              if (event.detail > 0) onPick(choice.value);
            }}
          />
          <span>{choice.step}</span>
          {choice.value !== '' && <span className="num">{choice.value}</span>}
        </label>
      ))}
    </fieldset>
  );
}

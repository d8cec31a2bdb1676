import { useState } from 'react';
import { Button } from '#components/ui/Button.tsx';
import { NumberField, Select } from '#components/ui/Field.tsx';
import type { Criterion, CriterionLimit } from '#contract/criterion.ts';
import { readTypedNumber } from '#contract/format.ts';
import { limitInFull } from '#contract/what-if-words.ts';

interface TryLimitProps {
  criteria: readonly Criterion[];
  onTry: (criterion: Criterion, limit: CriterionLimit | null) => void;
}

type Kind = CriterionLimit['kind'] | 'none';
const KINDS: { value: Kind; name: string }[] = [
  { value: 'at-least', name: 'At least' },
  { value: 'at-most', name: 'At most' },
  { value: 'none', name: 'No limit' },
];

/** Chooses a criterion and tries another must-meet limit, or none. */
export function TryLimit({ criteria, onTry }: TryLimitProps) {
  const [criterionId, setCriterionId] = useState(criteria[0]?.id ?? '');
  const [chosenKind, setKind] = useState<Kind | null>(null);
  const [typed, setTyped] = useState('');
  const [error, setError] = useState<string | undefined>();
  const criterion = criteria.find(({ id }) => id === criterionId) ?? criteria[0];
  if (!criterion) return null;
  const usual = criterion.direction === 'more' ? 'at-least' : 'at-most';
  const kind = chosenKind ?? criterion.limit?.kind ?? usual;
  const attempt = (): void => {
    const value = readTypedNumber(typed);
    if (kind !== 'none' && typeof value !== 'number') {
      setError(`${typed.trim() || 'Nothing'} is no figure.`);
      return;
    }
    setError(undefined);
    setTyped('');
    onTry(criterion, kind === 'none' || typeof value !== 'number' ? null : { kind, value });
  };
  return (
    <form
      className="wi-form"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        attempt();
      }}
    >
      <Select
        label="Criterion of the limit"
        value={criterion.id}
        choices={criteria.map(({ id, name }) => ({ value: id, name }))}
        onChange={(event) => {
          setCriterionId(event.target.value);
          setKind(null);
          setTyped('');
          setError(undefined);
        }}
      />
      <Select
        label="Kind of limit"
        value={kind}
        choices={KINDS}
        onChange={(event) => setKind(KINDS.find(({ value }) => value === event.target.value)?.value ?? null)}
      />
      {kind !== 'none' && (
        <NumberField
          label="Limit to try"
          unit={criterion.unit || undefined}
          value={typed}
          error={error}
          onChange={(event) => setTyped(event.target.value)}
        />
      )}
      <div className="wi-form-acts">
        <Button size="small" type="submit">
          {kind === 'none' ? 'Try without a limit' : 'Try this limit'}
        </Button>
      </div>
      <p className="caption wi-form-note">
        The study’s limit of {criterion.name}: {limitInFull(criterion, criterion.limit)}.
      </p>
    </form>
  );
}

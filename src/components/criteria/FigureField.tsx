import { useState } from 'react';
import { NumberField } from '#components/ui/index.ts';
import { readTypedNumber } from '#contract/format.ts';

interface FigureFieldProps {
  label: string;
  labelHidden?: boolean;
  unit?: string | undefined;
  hint?: string;
  /** The figure as it stands, written out. */
  shown: string;
  /** What is wrong with a figure, in words; null where it will do. */
  fault: (value: number) => string | null;
  onRead: (value: number) => void;
}

/** A figure that is also moved elsewhere: read on leaving the field or on Enter; what will not do stays, and says why. */
export function FigureField({ shown, fault, onRead, ...looks }: FigureFieldProps) {
  const [typed, setTyped] = useState<{ over: string; text: string } | null>(null);
  const [error, setError] = useState<string | undefined>(undefined);
  // Moved meanwhile by a hand on the drawing, or by someone else: what stands now is shown.
  const current = typed?.over === shown ? typed.text : shown;
  const leave = (): void => {
    if (typed?.over !== shown || typed.text === shown) {
      setError(undefined);
      return;
    }
    const value = readTypedNumber(typed.text);
    const message = typeof value === 'number' ? fault(value) : 'Enter a number.';
    setError(message ?? undefined);
    if (message !== null || typeof value !== 'number') return;
    setTyped(null);
    onRead(value);
  };
  return (
    <NumberField
      {...looks}
      value={current}
      error={typed?.over === shown ? error : undefined}
      onChange={(event) => setTyped({ over: shown, text: event.target.value })}
      onBlur={leave}
      onKeyDown={(event) => {
        if (event.key === 'Enter') leave();
      }}
    />
  );
}

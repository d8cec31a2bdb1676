import { useId } from 'react';

export interface Segment<V extends string> {
  value: V;
  name: string;
  /** Not possible yet, and why. */
  notYet?: string | undefined;
}

interface SegmentedProps<V extends string> {
  /** What is chosen here, for screen readers. */
  legend: string;
  segments: readonly Segment<V>[];
  value: V;
  onChange: (value: V) => void;
}

/** One of a few, in a strip: radios underneath, so the arrow keys choose. */
export function Segmented<V extends string>({ legend, segments, value, onChange }: SegmentedProps<V>) {
  const name = useId();
  return (
    <fieldset className="segmented">
      <legend className="sr-only">{legend}</legend>
      {segments.map((segment) => (
        <label key={segment.value} title={segment.notYet}>
          <input
            type="radio"
            className="sr-only"
            name={name}
            value={segment.value}
            checked={segment.value === value}
            disabled={Boolean(segment.notYet)}
            onChange={() => onChange(segment.value)}
          />
          {segment.name}
        </label>
      ))}
    </fieldset>
  );
}

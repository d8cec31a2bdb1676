import { useEffect, useRef } from 'react';
import { formatCount } from '#contract/format.ts';

export interface SummaryLine {
  /** Id of the field, for the link. */
  fieldId: string;
  message: string;
}

/**
 * At the head of a form that was refused: its errors as links to their fields.
 * `attempt` goes up with each refused submission and brings the focus here.
 */
export function ErrorSummary({ lines, attempt }: { lines: readonly SummaryLine[]; attempt: number }) {
  const heading = useRef<HTMLHeadingElement>(null);
  useEffect(() => {
    if (attempt > 0) heading.current?.focus();
  }, [attempt]);
  if (lines.length === 0) return null;
  return (
    <div className="error-summary" role="alert">
      <h2 tabIndex={-1} ref={heading}>
        {formatCount(lines.length, 'field needs', 'fields need')} another look
      </h2>
      <ul>
        {lines.map((line) => (
          <li key={line.fieldId}>
            <a
              href={`#${line.fieldId}`}
              onClick={(event) => {
                event.preventDefault();
                document.getElementById(line.fieldId)?.focus();
              }}
            >
              {line.message}
            </a>
          </li>
        ))}
      </ul>
    </div>
  );
}

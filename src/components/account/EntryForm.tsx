import type { FormEvent, ReactNode } from 'react';
import type { ApiError } from '#components/live/api.ts';
import { Button, Notice } from '#components/ui/index.ts';

interface EntryFormProps {
  /** What the form is for, for screen readers. */
  label: string;
  /** Verb and object of its one button. */
  action: string;
  busy: boolean;
  /** The server's refusal, where it belongs to no single field. */
  error: ApiError | null;
  /** What was kept, and what to do, under the refusal. */
  advice: ReactNode;
  onSubmit: (event: FormEvent) => void;
  children: ReactNode;
  /** Beside the button. */
  aside?: ReactNode;
}

/**
 * A form of the pages before sign-in. Its method is POST so that a press of Enter before the page's script runs never
 * puts a password into the address.
 */
export function EntryForm({ label, action, busy, error, advice, onSubmit, children, aside }: EntryFormProps) {
  return (
    <form
      method="post"
      className="grid max-w-[26rem] content-start gap-4"
      aria-label={label}
      noValidate
      onSubmit={onSubmit}
    >
      {error && (
        <Notice fact={error.message} requestId={error.status >= 500 ? error.requestId : undefined}>
          {advice}
        </Notice>
      )}
      {children}
      <div className="flex flex-wrap items-center gap-4">
        <Button type="submit" kind="primary" busy={busy}>
          {action}
        </Button>
        {aside}
      </div>
    </form>
  );
}

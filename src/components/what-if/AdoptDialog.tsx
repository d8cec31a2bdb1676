import { useState } from 'react';
import type { ApiError } from '#components/live/api.ts';
import { Button } from '#components/ui/Button.tsx';
import { Dialog } from '#components/ui/Dialog.tsx';
import { TextArea } from '#components/ui/Field.tsx';
import { Notice } from '#components/ui/States.tsx';
import { formatCount } from '#contract/format.ts';
import type { ChangeLine } from '#contract/what-if-words.ts';
import { keyOf } from './ChangeList.tsx';

interface AdoptDialogProps {
  name: string;
  revision: number;
  lines: readonly ChangeLine[];
  /** Entries that count for nothing now. */
  ignored: number;
  busy: boolean;
  error: ApiError | null;
  onClose: () => void;
  onAdopt: (reason: string) => void;
}

/** Asked before a what-if becomes the study's own: everything that will change, and the reason to be written. */
export function AdoptDialog(props: AdoptDialogProps) {
  const { name, revision, lines, ignored, busy, error, onClose, onAdopt } = props;
  const [reason, setReason] = useState('');
  const [missing, setMissing] = useState(false);
  const submit = (): void => {
    setMissing(reason.trim() === '');
    if (reason.trim() !== '') onAdopt(reason.trim());
  };
  return (
    <Dialog
      open
      wide
      onClose={onClose}
      title={`Adopt “${name}”?`}
      actions={
        <>
          <Button kind="text" onClick={onClose}>
            Not now
          </Button>
          <Button kind="primary" icon="done" busy={busy} onClick={submit}>
            Adopt “{name}”
          </Button>
        </>
      }
    >
      <p>
        Revision {revision} becomes {revision + 1}, for everyone, with these changes; each stands in the
        record under this what-if’s name.
      </p>
      <ul className="wi-adopt">
        {lines.map((line) => (
          <li key={keyOf(line)}>{sentenceOf(line)}</li>
        ))}
      </ul>
      {ignored > 0 && (
        <p className="caption">
          {formatCount(ignored, 'entry is', 'entries are')} left aside: site or criterion has gone.
        </p>
      )}
      <TextArea
        label="Reason"
        hint="Kept with the study’s record, and with its weights where they change."
        maxLength={2_000}
        value={reason}
        error={missing ? 'Write the reason for adopting it.' : undefined}
        onChange={(event) => setReason(event.target.value)}
      />
      {error && (
        <Notice fact="Nothing was adopted" requestId={error.requestId}>
          {error.message}
        </Notice>
      )}
    </Dialog>
  );
}

function sentenceOf({ at, what, from, to, each, falls }: ChangeLine): string {
  if (at.kind === 'left-out') return `${what} is removed from Sites; it can be brought back there.`;
  if (at.kind === 'weights') return each.length > 0 ? `${what}: ${each.join(', ')}.` : `${what}.`;
  return `${what}: ${from} becomes ${to}${falls ? `; ${falls}` : ''}.`;
}

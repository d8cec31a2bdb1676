import { useState } from 'react';
import { ApiError, send } from '#components/live/api.ts';
import { ConfirmDialog, Notice } from '#components/ui/index.ts';
import type { StudyMember } from '#contract/member.ts';
import { nameOf } from './words.ts';

interface RemoveProps {
  studyId: string;
  member: StudyMember;
  onClose: () => void;
  onDone: () => void;
}

/** Asks before someone is taken out, or leaves; whoever leaves goes to the list of studies. */
export function RemoveDialog({ studyId, member, onClose, onDone }: RemoveProps) {
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<ApiError | null>(null);
  const remove = async () => {
    setBusy(true);
    try {
      await send('DELETE', `/api/v1/studies/${studyId}/members/${member.id}`, undefined, {
        ifMatch: `"${member.version}"`,
      });
      if (member.you) location.assign('/studies');
      else onDone();
    } catch (error) {
      if (!(error instanceof ApiError)) throw error;
      setFailure(error);
      setBusy(false);
    }
  };
  return (
    <ConfirmDialog
      open
      onClose={onClose}
      onConfirm={() => void remove()}
      title={member.you ? 'Leave this study?' : `Remove ${nameOf(member)}?`}
      confirm={member.you ? 'Leave study' : `Remove ${nameOf(member)}`}
      destructive
      busy={busy}
    >
      {member.you
        ? 'The study disappears from your list. A lead can add you again; what you did stays in the record.'
        : 'The study disappears from their list at once. Their comments, weights and changes stay in the record.'}
      {failure && (
        <div className="mt-3">
          <Notice fact={failure.message} requestId={failure.requestId}>
            Nobody was removed.
          </Notice>
        </div>
      )}
    </ConfirmDialog>
  );
}

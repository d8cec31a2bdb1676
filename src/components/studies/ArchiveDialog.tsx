import { useState } from 'react';
import { ApiError, send } from '#components/live/api.ts';
import { ConfirmDialog, Notice } from '#components/ui/index.ts';
import type { Study } from '#contract/study.ts';

interface ArchiveProps {
  study: Study | null;
  onClose: () => void;
  onDone: (study: Study) => void;
}

/** Asks before a study is archived or restored, and does it. */
export function ArchiveDialog({ study, onClose, onDone }: ArchiveProps) {
  if (!study) return null;
  return <OpenArchive key={study.id} study={study} onClose={onClose} onDone={onDone} />;
}

function OpenArchive({ study, onClose, onDone }: ArchiveProps & { study: Study }) {
  const [busy, setBusy] = useState(false);
  const [failure, setFailure] = useState<ApiError | null>(null);
  const verb = study.archived ? 'Restore' : 'Archive';
  const act = async () => {
    setBusy(true);
    try {
      const patch = { archived: !study.archived, version: study.version };
      onDone(await send<Study>('PATCH', `/api/v1/studies/${study.id}`, patch));
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
      onConfirm={() => void act()}
      title={`${verb} ${study.title}?`}
      confirm={`${verb} study`}
      busy={busy}
    >
      {study.archived
        ? 'It comes back to the list as it was, and its members can change it again.'
        : 'It leaves the list and takes no changes until a lead restores it. Nothing is lost.'}
      {failure && (
        <div className="mt-3">
          <Notice fact={failure.message} requestId={failure.requestId}>
            The study is as it was. Close this and look at it again.
          </Notice>
        </div>
      )}
    </ConfirmDialog>
  );
}

import './upload.css';
import { useEffect, useRef } from 'react';
import { Notice } from '#components/ui/States.tsx';
import { PickFile } from './PickFile.tsx';
import { ReadFile } from './ReadFile.tsx';
import { UnreadFile } from './UnreadFile.tsx';
import { UploadHistory } from './UploadHistory.tsx';
import { useUpload } from './use-upload.ts';

interface UploadPanelProps {
  studyId: string;
  /** Why the inputs can't be changed; null where they can. */
  locked: string | null;
}

/**
 * The upload of candidate sites, an island of its own at the foot of the Sites sheet, at the address #upload:
 * `<UploadPanel client:load studyId={studyId} locked={inputsLock(frame)} />`. It tells the site table's swr entry
 * (`/api/v1/studies/{studyId}/sites#all`) when it has written.
 */
export function UploadPanel({ studyId, locked }: UploadPanelProps) {
  const upload = useUpload(studyId);
  const { state, error, choices } = upload;
  const panel = useFocusOnChange(state.kind);
  return (
    <section
      className="panel upload"
      id="upload"
      aria-label="Upload of candidate sites"
      ref={panel}
      tabIndex={-1}
    >
      {(state.kind === 'idle' || state.kind === 'reading') && <h2>Upload a CSV</h2>}
      {error && (
        <Notice fact={error.message} requestId={error.requestId}>
          {error.errors.map(({ path, message }) => (
            <span key={path} className="block">
              {message}
            </span>
          ))}
          {error.code === 'offline' && 'Try again once the server answers.'}
        </Notice>
      )}
      {state.kind === 'idle' && <PickFile onFile={(file) => void upload.take(file)} locked={locked} />}
      {state.kind === 'reading' && <p role="status">{`Reading ${state.fileName}…`}</p>}
      {state.kind === 'unreadable' && (
        <UnreadFile
          fileName={state.source.fileName}
          file={state.file}
          choices={choices}
          onChoose={upload.choose}
          onCancel={upload.cancel}
        />
      )}
      {state.kind === 'read' && (
        <ReadFile
          fileName={state.source.fileName}
          file={state.file}
          moved={state.moved}
          locked={locked}
          choices={choices}
          writing={upload.writing}
          onChoose={upload.choose}
          onCommit={(chosen) => void upload.commit(chosen)}
          onCancel={upload.cancel}
        />
      )}
      <UploadHistory studyId={studyId} locked={locked} onUndo={upload.undo} />
    </section>
  );
}

/** What was pressed is gone when the panel turns to another state: the focus goes to the panel, not to the page's head. */
function useFocusOnChange(kind: string) {
  const panel = useRef<HTMLElement>(null);
  const drawn = useRef(kind);
  useEffect(() => {
    if (drawn.current === kind) return;
    drawn.current = kind;
    panel.current?.focus({ preventScroll: true });
  }, [kind]);
  return panel;
}

import { useId, useRef, useState } from 'react';
import { ApiError, send } from '#components/live/api.ts';
import { useApi } from '#components/live/hooks.ts';
import { announceKept, announceSaved, announceSaving } from '#components/live/saved.ts';
import { Button, IconButton } from '#components/ui/Button.tsx';
import { ConfirmDialog } from '#components/ui/Dialog.tsx';
import { Notice } from '#components/ui/States.tsx';
import {
  EVIDENCE_TYPES,
  MAX_EVIDENCE_BYTES,
  type Evidence,
  type EvidenceInput,
  type EvidenceList,
  type EvidenceRemoved,
  type SavedEvidence,
} from '#contract/evidence.ts';
import { formatDateUtc, formatNumber } from '#contract/format.ts';

interface EvidenceFilesProps {
  studyId: string;
  figure: EvidenceInput;
  /** Why no file can be added or taken away; undefined where it can. */
  locked: string | undefined;
  onChange: () => void;
}

/** "PDF, 1,240 kB, added 2026-12-01 by Ada Quill" */
function factsOf({ mediaType, byteLength, createdAt, by }: Evidence): string {
  const kB = formatNumber(Math.max(1, Math.round(byteLength / 1000)));
  return `${EVIDENCE_TYPES[mediaType]}, ${kB} kB, added ${formatDateUtc(createdAt)} by ${by}`;
}

/** The files that support a figure: to save to disk, to add to, to take away. None is ever opened in the page. */
export function EvidenceFiles({ studyId, figure, locked, onChange }: EvidenceFilesProps) {
  const address = `/api/v1/studies/${studyId}/evidence`;
  const { data, error, mutate } = useApi<EvidenceList>(
    `${address}?${new URLSearchParams({ ...figure, pageSize: '100' })}`,
    { keepPreviousData: false },
  );
  const [busy, setBusy] = useState(false);
  const [refused, setRefused] = useState<string | null>(null);
  const [leaving, setLeaving] = useState<Evidence | null>(null);
  const picker = useRef<HTMLInputElement>(null);
  const headingId = useId();

  const run = async (act: () => Promise<SavedEvidence | EvidenceRemoved>): Promise<void> => {
    setBusy(true);
    setRefused(null);
    announceSaving();
    try {
      announceSaved(await act());
      await mutate();
      onChange();
    } catch (caught) {
      announceKept();
      if (!(caught instanceof ApiError)) throw caught;
      setRefused(caught.errors[0]?.message ?? caught.message);
    } finally {
      setBusy(false);
    }
  };
  const add = (file: File): void => {
    if (file.size > MAX_EVIDENCE_BYTES) {
      setRefused(`${file.name} is larger than 10 MB. Nothing was kept.`);
      return;
    }
    const form = new FormData();
    form.set('file', file);
    form.set('siteId', figure.siteId);
    form.set('criterionId', figure.criterionId);
    void run(() => send<SavedEvidence>('POST', address, form));
  };
  const remove = ({ id }: Evidence): void => {
    setLeaving(null);
    void run(() => send<EvidenceRemoved>('DELETE', `${address}/${id}`));
  };
  return (
    <section className="fig-evidence" aria-labelledby={headingId}>
      <h3 id={headingId}>Evidence</h3>
      {error && <Notice fact="The evidence files could not be read.">{error.message}</Notice>}
      {data?.total === 0 && <p className="caption">No evidence files yet.</p>}
      <ul>
        {data?.items.map((file) => (
          <li key={file.id}>
            <span>
              <a href={`${address}/${file.id}/file`} download={file.fileName}>
                {file.fileName}
              </a>
              <span className="sub" title={`SHA-256 ${file.sha256}`}>
                {factsOf(file)}
              </span>
            </span>
            {locked === undefined && (
              <IconButton icon="remove" label={`Remove ${file.fileName}`} onClick={() => setLeaving(file)} />
            )}
          </li>
        ))}
      </ul>
      {refused !== null && <Notice fact="The evidence was left as it was.">{refused}</Notice>}
      <input
        ref={picker}
        type="file"
        className="sr-only"
        tabIndex={-1}
        aria-label="Evidence file"
        accept=".pdf,.png,.jpg,.jpeg,.webp,.csv"
        onChange={({ target }) => {
          const file = target.files?.[0];
          if (file) add(file);
          target.value = '';
        }}
      />
      <Button icon="upload" busy={busy} notYet={locked} onClick={() => picker.current?.click()}>
        Add an evidence file
      </Button>
      <p className="caption">PDF, picture or CSV, up to 10 MB. Told by its contents, not by its name.</p>
      <ConfirmDialog
        open={leaving !== null}
        onClose={() => setLeaving(null)}
        onConfirm={() => leaving && remove(leaving)}
        title={`Remove ${leaving?.fileName ?? 'the file'}?`}
        confirm={`Remove ${leaving?.fileName ?? 'the file'}`}
        destructive
      >
        The figure loses this evidence for everyone. The record keeps that it was there, and its checksum.
      </ConfirmDialog>
    </section>
  );
}

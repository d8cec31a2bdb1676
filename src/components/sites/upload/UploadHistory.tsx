import { useState } from 'react';
import { useApi } from '#components/live/hooks.ts';
import { Button, ButtonLink } from '#components/ui/Button.tsx';
import { ConfirmDialog } from '#components/ui/Dialog.tsx';
import { TableScroll } from '#components/ui/TableScroll.tsx';
import { formatCount, formatDateTimeUtc, formatNumber } from '#contract/format.ts';
import type { UploadList, UploadSummary } from '#contract/upload.ts';

interface UploadHistoryProps {
  studyId: string;
  locked: string | null;
  onUndo: (uploadId: string) => Promise<void>;
}

const PAGE_SIZE = 10;

/** The files uploaded so far: each can be had back, and undone until a site of it was edited. */
export function UploadHistory({ studyId, locked, onUndo }: UploadHistoryProps) {
  const address = `/api/v1/studies/${studyId}/uploads`;
  const [page, setPage] = useState(1);
  const { data } = useApi<UploadList>(`${address}?pageSize=${PAGE_SIZE}&page=${page}`);
  const [asked, setAsked] = useState<UploadSummary | null>(null);
  const [busy, setBusy] = useState(false);
  if (!data || data.total === 0) return null;
  const confirm = async () => {
    if (!asked) return;
    setBusy(true);
    await onUndo(asked.uploadId);
    setBusy(false);
    setAsked(null);
  };
  return (
    <details className="upload-history">
      <summary>{`Files kept: ${formatNumber(data.total)}`}</summary>
      <TableScroll label="Uploaded files">
        <table className="table" data-dense="">
          <thead>
            <tr>
              <th scope="col">File</th>
              <th scope="col">Uploaded</th>
              <th scope="col">By</th>
              <th scope="col">What became of it</th>
              <th scope="col">
                <span className="sr-only">Actions</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {data.items.map((item) => (
              <tr key={item.uploadId}>
                <th scope="row" className="upload-name">
                  {item.fileName}
                </th>
                <td className="num upload-when">{formatDateTimeUtc(item.createdAt)}</td>
                <td>{item.by}</td>
                <td>{fateOf(item)}</td>
                <td>
                  <div className="upload-acts">
                    <ButtonLink
                      kind="text"
                      size="small"
                      href={`${address}/${item.uploadId}/file`}
                      download={item.fileName}
                      aria-label={`Original file ${item.fileName}`}
                    >
                      Original file
                    </ButtonLink>
                    {item.state === 'committed' && (
                      <Button
                        kind="text"
                        size="small"
                        notYet={locked ?? undefined}
                        aria-label={`Undo the upload of ${item.fileName}`}
                        onClick={() => setAsked(item)}
                      >
                        Undo
                      </Button>
                    )}
                  </div>
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </TableScroll>
      {data.total > PAGE_SIZE && (
        <div className="upload-pages">
          <Button
            size="small"
            notYet={page === 1 ? 'These are the latest.' : undefined}
            onClick={() => setPage(page - 1)}
          >
            Later files
          </Button>
          <Button
            size="small"
            notYet={page * PAGE_SIZE >= data.total ? 'There are no earlier ones.' : undefined}
            onClick={() => setPage(page + 1)}
          >
            Earlier files
          </Button>
        </div>
      )}
      <ConfirmDialog
        open={asked !== null}
        onClose={() => setAsked(null)}
        onConfirm={() => void confirm()}
        title={`Undo the upload of ${asked?.fileName ?? ''}?`}
        confirm="Undo the upload"
        destructive
        busy={busy}
      >
        <p>
          {`${formatCount(asked?.added ?? 0, 'added site')} will be removed and ${formatCount(asked?.updated ?? 0, 'updated site')} put back as before. The file stays.`}
        </p>
      </ConfirmDialog>
    </details>
  );
}

function fateOf({ state, added, updated, committedAt }: UploadSummary): string {
  if (state === 'read') return 'Read, nothing added';
  if (committedAt === null) return 'Cancelled, nothing added';
  const done = `${formatNumber(added)} added, ${formatNumber(updated)} updated`;
  return state === 'undone' ? `${done}; undone` : done;
}

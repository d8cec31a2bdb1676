import { useCallback, useRef, useState } from 'react';
import { useSWRConfig } from 'swr';
import { ApiError, send } from '#components/live/api.ts';
import { announceKept, announceSaved, announceSaving } from '#components/live/saved.ts';
import { toast } from '#components/ui/Toast.tsx';
import type { UploadCommit, UploadCommitted, UploadPreview, UploadUndone } from '#contract/upload.ts';
import { MAX_FILE_BYTES } from '#core/csv/limits.ts';
import type { SitesFile, UnreadableFile } from '#core/csv/read-sites.ts';
import { appendChoices, columnChoices, NO_CHOICES, type Choices } from './choices.ts';
import { readContents, readInWorker } from './reader.ts';
import { sameRows } from './row-filter.ts';
import { doneInWords } from './words.ts';

/** A picked, dropped or pasted table. */
export interface Source {
  fileName: string;
  bytes: Uint8Array<ArrayBuffer>;
}

export type UploadState =
  | { kind: 'idle' }
  | { kind: 'reading'; fileName: string }
  | { kind: 'unreadable'; source: Source; file: UnreadableFile }
  | {
      kind: 'read';
      source: Source;
      file: SitesFile;
      /** The study changed since the rows were shown. */ moved: boolean;
    };

const TOO_LARGE: UnreadableFile = {
  kind: 'refused',
  code: 'too-large',
  message: 'The file is larger than 5 MB.',
  columns: [],
};

async function sourceOf(file: File): Promise<Source> {
  return { fileName: file.name, bytes: new Uint8Array(await file.arrayBuffer()) };
}

/** An upload from the picked file to the commit, and the way back. */
export function useUpload(studyId: string) {
  const address = `/api/v1/studies/${studyId}/uploads`;
  const { mutate } = useSWRConfig();
  const [state, setState] = useState<UploadState>({ kind: 'idle' });
  const [choices, setChoices] = useState<Choices>(NO_CHOICES);
  const [error, setError] = useState<ApiError | null>(null);
  const [writing, setWriting] = useState(false);
  const turn = useRef(0);

  /** Runs what may be refused by the server; a refusal stands on the panel. */
  const guarded = useCallback(async (act: () => Promise<void>): Promise<void> => {
    setError(null);
    try {
      await act();
    } catch (caught) {
      if (!(caught instanceof ApiError)) throw caught;
      setError(caught);
      // Nothing was read: the panel offers to pick a file again.
      setState((now) => (now.kind === 'reading' ? { kind: 'idle' } : now));
    }
  }, []);

  const read = useCallback(
    (source: Source, next: Choices, moved = false) =>
      guarded(async () => {
        turn.current += 1;
        const mine = turn.current;
        const contents = await readContents(studyId);
        const { delimiter, encoding } = next;
        const options = { ...contents, columns: columnChoices(next), delimiter, encoding };
        const file = await readInWorker(source.bytes, options);
        if (mine !== turn.current) return;
        setState(
          file.kind === 'read' ? { kind: 'read', source, file, moved } : { kind: 'unreadable', source, file },
        );
      }),
    [guarded, studyId],
  );

  const take = useCallback(
    async (file: File) => {
      setChoices(NO_CHOICES);
      setState({ kind: 'reading', fileName: file.name });
      if (file.size > MAX_FILE_BYTES) {
        const source = { fileName: file.name, bytes: new Uint8Array() };
        setState({ kind: 'unreadable', source, file: TOO_LARGE });
      } else await read(await sourceOf(file), NO_CHOICES);
    },
    [read],
  );

  const choose = (next: Choices) => {
    setChoices(next);
    if (state.kind === 'read' || state.kind === 'unreadable') void read(state.source, next);
  };

  const refresh = useCallback(
    () =>
      Promise.all([
        mutate(`/api/v1/studies/${studyId}/sites#all`),
        mutate((key) => typeof key === 'string' && key.startsWith(address)),
      ]),
    [mutate, studyId, address],
  );

  const undo = useCallback(
    (uploadId: string) =>
      guarded(async () => {
        announceSaving();
        try {
          announceSaved(await send<UploadUndone>('DELETE', `${address}/${uploadId}`));
        } catch (caught) {
          announceKept();
          throw caught;
        }
        await refresh();
      }),
    [address, guarded, refresh],
  );

  /** Sends the file, and writes the chosen rows where the server reads them as the page did. */
  const commit = async (chosen: UploadCommit) => {
    if (state.kind !== 'read') return;
    const { source, file } = state;
    setWriting(true);
    await guarded(async () => {
      const form = new FormData();
      form.set('file', new File([source.bytes], source.fileName));
      appendChoices(form, choices);
      const preview = await send<UploadPreview>('POST', address, form);
      if (!sameRows(preview.rows, file.rows)) {
        await send('DELETE', `${address}/${preview.uploadId}`);
        await read(source, choices, true);
        return;
      }
      announceSaving();
      const done = await send<UploadCommitted>('POST', `${address}/${preview.uploadId}/commit`, chosen);
      announceSaved(done);
      setState({ kind: 'idle' });
      toast(doneInWords(done, source.fileName), () => void undo(preview.uploadId));
      await refresh();
    });
    setWriting(false);
  };

  const cancel = () => {
    turn.current += 1;
    setError(null);
    setState({ kind: 'idle' });
  };

  return { state, choices, error, writing, take, choose, commit, cancel, undo };
}

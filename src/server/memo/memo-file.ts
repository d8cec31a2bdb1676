import { createHash } from 'node:crypto';
import type { MemoModel } from '#contract/memo.ts';
import { runInThread } from '#server/threads.ts';

export interface MemoFile {
  bytes: Uint8Array<ArrayBuffer>;
  pages: number;
}

/** Files kept: a memo is asked for twice, once by its screen for its length and once to be read. */
const KEPT = 12;
const files = new Map<string, Promise<MemoFile>>();

/** Page objects of the file; the writer leaves its dictionaries readable. */
const pagesOf = (bytes: Uint8Array): number =>
  Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength)
    .toString('latin1')
    .match(/\/Type \/Page\b/g)?.length ?? 0;

async function render(model: MemoModel): Promise<MemoFile> {
  const bytes = await runInThread<Uint8Array<ArrayBuffer>>('memo-thread', model);
  return { bytes, pages: pagesOf(bytes) };
}

/** The memo's PDF, rendered off the main thread; the same model is rendered once while it is remembered. */
export function memoFile(model: MemoModel): Promise<MemoFile> {
  const key = createHash('sha256').update(JSON.stringify(model)).digest('base64');
  const known = files.get(key);
  files.delete(key);
  const file = known ?? render(model);
  files.set(key, file);
  file.catch(() => files.delete(key));
  for (const old of files.keys()) {
    if (files.size <= KEPT) break;
    files.delete(old);
  }
  return file;
}

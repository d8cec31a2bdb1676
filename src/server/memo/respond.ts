import type { MemoPaper } from '#contract/memo.ts';
import type { PooledDb } from '#db/client.ts';
import { readSnapshot } from '#server/ranking/read-snapshot.ts';
import { buildMemo } from './build-memo.ts';
import { canonicalInputs } from './inputs.ts';
import { memoFile } from './memo-file.ts';

/** A file name that every system takes: letters, digits and hyphens of the study's title. */
function fileName(title: string, revision: number): string {
  const plain = title
    .normalize('NFKD')
    .replace(/[^A-Za-z0-9]+/g, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 60);
  return `${plain === '' ? 'memo' : plain.toLowerCase()}-draft-r${revision}.pdf`;
}

interface Asked {
  studyId: string;
  userId: string;
}

/** The memo as a PDF; `x-memo-pages` says how long it is, for whoever asks by HEAD. @throws AppError 'not-found' */
export async function respondWithMemo(
  db: PooledDb,
  asked: Asked & { paper: MemoPaper; now: Date },
): Promise<Response> {
  const model = await buildMemo(db, asked);
  const { bytes, pages } = await memoFile(model);
  const { study, revision } = model.titleBlock;
  return new Response(bytes, {
    headers: {
      'content-type': 'application/pdf',
      'content-length': String(bytes.byteLength),
      'content-disposition': `inline; filename="${fileName(study, revision)}"`,
      'cache-control': 'no-store',
      'x-memo-pages': String(pages),
    },
  });
}

/** The memo's inputs, byte for byte the text whose checksum it prints. @throws AppError 'not-found' */
export async function respondWithInputs(db: PooledDb, asked: Asked): Promise<Response> {
  const { text, checksum } = canonicalInputs(await readSnapshot(db, asked));
  return new Response(text, {
    headers: {
      'content-type': 'application/json',
      'content-disposition': 'attachment; filename="memo-inputs.json"',
      'cache-control': 'no-store',
      'x-checksum-sha256': checksum,
    },
  });
}

import { isDeepStrictEqual } from 'node:util';
import type { UploadCommit, UploadCommitted } from '#contract/upload.ts';
import type { Db, PooledDb } from '#db/client.ts';
import type { SiteRow } from '#db/queries/site.ts';
import { findUpload, insertSites, markCommitted, updateSites } from '#db/queries/upload.ts';
import { changeStudy, type RecordEntry } from '#server/change-study.ts';
import { AppError, notFound } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { fillCriteria } from './criteria.ts';
import { Reading, type Effect } from './kept.ts';
import { planCommit } from './plan-commit.ts';
import { readStudyFile, type StudyFile } from './read-file.ts';
import { refuseUnheld } from './refuse-unheld.ts';
import { fieldsOf, newFields, updatedFields, type WrittenFields } from './site-fields.ts';

interface CommitRequest {
  member: Member;
  uploadId: string;
  commit: UploadCommit;
}

/**
 * Writes the chosen rows of an upload, all or none. The file is read again against the study as it is now, so that
 * a name or code taken since the preview is refused here too.
 * @throws AppError 'not-found' · 'conflict' where the upload was committed or undone · 'invalid'
 */
export async function commitUpload(
  db: PooledDb,
  { member, uploadId, commit }: CommitRequest,
): Promise<UploadCommitted> {
  const { studyId } = member;
  return changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    const read = await readKept(tx, { studyId, uploadId });
    const plan = planCommit(read.file.rows, read.sites, commit);
    const filled = await fillCriteria(tx, {
      studyId,
      columns: read.file.columns,
      rows: [...plan.add, ...plan.update].map(({ row }) => row),
      existing: read.criteria,
    });
    const updates = plan.update.map(({ row, before }) => ({
      line: row.line,
      before,
      fields: updatedFields({ row, before }, read.file.columns, filled.columns),
    }));
    refuseUnheld(updates, filled.columns);
    const added = await addRows(
      tx,
      { studyId, uploadId },
      plan.add.map((add) => ({ line: add.row.line, fields: newFields(add, filled.columns) })),
    );
    const changed = await writeChanged(tx, studyId, updates);
    const effect: Effect = { added: added.effect, updated: changed.effect, criteria: filled.made };
    await markCommitted(tx, { studyId, uploadId, effect });
    return {
      result: {
        uploadId,
        added: added.effect.length,
        updated: changed.effect.length,
        skipped: plan.skipped + plan.update.length - changed.effect.length,
        sites: [...added.sites, ...changed.sites].sort((a, b) => a.line - b.line),
      },
      entries: [...filled.entries, ...added.entries, ...changed.entries],
    };
  });
}

async function readKept(tx: Db, scope: { studyId: string; uploadId: string }): Promise<StudyFile> {
  const kept = await findUpload(tx, scope);
  if (!kept) throw notFound('There is no such upload in this study.');
  if (kept.state !== 'read')
    throw new AppError('conflict', `This upload was ${kept.state} before. Nothing was written.`, {
      current: { state: kept.state },
    });
  return readStudyFile(tx, {
    studyId: scope.studyId,
    bytes: kept.bytes,
    options: Reading.parse(kept.reading),
  });
}

type Line = UploadCommitted['sites'][number];

interface Written<T> {
  effect: T[];
  sites: Line[];
  entries: RecordEntry[];
}

async function addRows(
  tx: Db,
  scope: { studyId: string; uploadId: string },
  rows: readonly { line: number; fields: WrittenFields }[],
): Promise<Written<Effect['added'][number]>> {
  const ids = await insertSites(tx, { ...scope, sites: rows.map(({ fields }) => fields) });
  const made = rows.map(({ line, fields: { nameKey: _nameKey, ...to } }, i) => ({
    id: ids[i] ?? '',
    line,
    to,
  }));
  return {
    effect: made.map(({ id }) => ({ id, version: 1 })),
    sites: made.map(({ id, line }) => ({ line, siteId: id, action: 'add' })),
    entries: made.map(({ id, to }) => ({ object: 'site', objectId: id, action: 'add', to: { id, ...to } })),
  };
}

async function writeChanged(
  tx: Db,
  studyId: string,
  rows: readonly { line: number; before: SiteRow; fields: WrittenFields }[],
): Promise<Written<Effect['updated'][number]>> {
  const moved = rows
    .map((row) => ({ ...row, was: fieldsOf(row.before) }))
    .map((row) => ({ ...row, keys: changedKeys(row.was, row.fields) }))
    .filter(({ keys }) => keys.length > 0);
  await updateSites(tx, {
    studyId,
    sites: moved.map(({ before, fields }) => ({ ...fields, id: before.id })),
  });
  return {
    effect: moved.map(({ before, was }) => ({ id: before.id, version: before.version + 1, before: was })),
    sites: moved.map(({ before, line }) => ({ line, siteId: before.id, action: 'change' })),
    entries: moved.map(({ before, was, fields, keys }) => ({
      object: 'site',
      objectId: before.id,
      action: 'change',
      from: pick(was, keys),
      to: pick(fields, keys),
    })),
  };
}

type Key = Exclude<keyof WrittenFields, 'nameKey'>;

function changedKeys(was: WrittenFields, now: WrittenFields): Key[] {
  const keys = Object.keys(was).filter((key): key is Key => key !== 'nameKey');
  // Not by their JSON: the database keeps an order of keys of its own.
  return keys.filter((key) => !isDeepStrictEqual(was[key], now[key]));
}

function pick(fields: WrittenFields, keys: readonly Key[]): Record<string, unknown> {
  return Object.fromEntries(keys.map((key) => [key, fields[key]]));
}

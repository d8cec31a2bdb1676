import type { UploadOptions } from '#contract/upload.ts';
import { readSites, type SitesFile } from '#core/csv/read-sites.ts';
import type { Db } from '#db/client.ts';
import { listCriteria, type CriterionRow } from '#db/queries/criterion.ts';
import type { SiteRow } from '#db/queries/site.ts';
import { listAllSites } from '#db/queries/upload.ts';
import { AppError } from '#server/errors.ts';

/** A file read beside what the study holds at the moment. */
export interface StudyFile {
  file: SitesFile;
  sites: SiteRow[];
  criteria: CriterionRow[];
}

const KINDS = { entered: 'number', rating: 'rating', text: 'text', computed: 'computed' } as const;

/**
 * Reads a file by the same code as the browser, against the study as it is now.
 * @throws AppError 'too-large' · 'invalid' where the file as a whole cannot be read
 */
export async function readStudyFile(
  db: Db,
  { studyId, bytes, options }: { studyId: string; bytes: Uint8Array; options: UploadOptions },
): Promise<StudyFile> {
  const sites = await listAllSites(db, { studyId });
  const criteria = await listCriteria(db, { studyId });
  const file = readSites(bytes, {
    existing: sites,
    criteria: criteria.map(({ id, name, unit, source, ratingSteps }) => ({
      id,
      name,
      unit,
      kind: KINDS[source],
      steps: ratingSteps,
    })),
    ...options,
  });
  if (file.kind === 'read') return { file, sites, criteria };
  const { message } = file;
  const code = file.code === 'too-large' ? 'too-large' : 'invalid';
  const path = file.code === 'columns' || file.code === 'encoding' ? file.code : 'file';
  throw new AppError(code, `${message} Nothing was kept.`, { errors: [{ path, message }] });
}

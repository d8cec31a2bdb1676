import { writeSites } from '#core/csv/export.ts';
import type { Db } from '#db/client.ts';
import { listCriteria } from '#db/queries/criterion.ts';
import { listAllSites } from '#db/queries/upload.ts';

/** A study's sites with their entered figures as CSV, which can be uploaded again. */
export async function exportCsv(db: Db, { studyId }: { studyId: string }): Promise<Response> {
  const entered = (await listCriteria(db, { studyId })).filter(({ source }) => source !== 'computed');
  return new Response(writeSites(await listAllSites(db, { studyId }), entered), {
    headers: {
      'content-type': 'text/csv; charset=utf-8',
      'content-disposition': 'attachment; filename="sites.csv"',
      'cache-control': 'private, no-store',
    },
  });
}

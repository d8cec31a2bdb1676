import type { SavedSite, SiteInput } from '#contract/site.ts';
import { foldName } from '#core/csv/codes.ts';
import type { PooledDb } from '#db/client.ts';
import { insertSite } from '#db/queries/site.ts';
import { changeStudy } from '#server/change-study.ts';
import type { Member } from '#server/member.ts';
import { checkFigures, patchedFigures } from './entered-figures.ts';
import { claimIdentity } from './identity.ts';
import { presentSite, recordedSite } from './present.ts';

/** Adds one candidate site; without a code it gets one made from its name. @throws AppError 'invalid' */
export async function addSite(
  db: PooledDb,
  { member, input }: { member: Member; input: SiteInput },
): Promise<SavedSite> {
  const { studyId } = member;
  return changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    const codes = await claimIdentity(tx, { studyId, wanted: input });
    const figures = patchedFigures({ values: {}, particulars: {} }, input);
    await checkFigures(tx, { studyId, after: figures, patch: input });
    const values = {
      ...input,
      ...figures,
      code: input.code ?? codes.make(input.name),
      nameKey: foldName(input.name),
    };
    const made = presentSite(await insertSite(tx, { studyId, values }));
    const entry = { object: 'site', objectId: made.id, action: 'add', to: recordedSite(made) };
    return { result: made, entries: [entry] };
  });
}

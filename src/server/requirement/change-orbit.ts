import type { OrbitPatch, StudyOrbit } from '#contract/requirement.ts';
import type { PooledDb } from '#db/client.ts';
import { findOrbit, listOrbits, updateOrbit } from '#db/queries/orbit.ts';
import { changeStudy, type RecordEntry, type Saved } from '#server/change-study.ts';
import { notFound, stale } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { codeInUse } from './code-in-use.ts';
import { orbitColumns, patchedFields } from './orbit-values.ts';
import { moveOrbit } from './place.ts';
import { presentOrbit } from './present.ts';

interface ChangeRequest {
  member: Member;
  orbitId: string;
  /** The version the change is based on. */
  version: number;
  patch: OrbitPatch;
}

/** Changes what is sent and moves the orbit where a position is sent. @throws AppError 'stale' · 'invalid' */
export async function changeOrbit(
  db: PooledDb,
  { member, orbitId, version, patch }: ChangeRequest,
): Promise<StudyOrbit & Saved> {
  const scope = { studyId: member.studyId, orbitId };
  return changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    const row = await findOrbit(tx, scope);
    if (!row) throw notFound('There is no such orbit in this study.');
    const before = presentOrbit(row);
    if (row.version !== version) throw stale(before);
    const fields = patchedFields(before, patch);
    const others = (await listOrbits(tx, scope)).filter(({ id }) => id !== orbitId);
    if (others.some(({ code }) => code === fields.code)) throw codeInUse(fields.code);
    if (differs(before, { ...before, ...fields }))
      await updateOrbit(tx, { ...scope, values: orbitColumns(fields) });
    if (patch.position !== undefined) await moveOrbit(tx, { ...scope, position: patch.position });
    const after = presentOrbit((await findOrbit(tx, scope)) ?? row);
    return { result: after, entries: entriesFor(before, after) };
  });
}

function differs(before: StudyOrbit, after: StudyOrbit): boolean {
  return (Object.keys(before) as (keyof StudyOrbit)[]).some(
    (field) => field !== 'version' && before[field] !== after[field],
  );
}

function entriesFor(before: StudyOrbit, after: StudyOrbit): RecordEntry[] {
  if (!differs(before, after)) return [];
  return [{ object: 'orbit', objectId: after.id, action: 'change', from: before, to: after }];
}

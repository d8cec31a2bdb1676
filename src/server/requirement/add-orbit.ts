import { MAX_ORBITS, type OrbitInput, type StudyOrbit } from '#contract/requirement.ts';
import type { PooledDb } from '#db/client.ts';
import { findOrbit, insertOrbit, listOrbits, type OrbitRow } from '#db/queries/orbit.ts';
import { changeStudy, type Saved } from '#server/change-study.ts';
import { AppError } from '#server/errors.ts';
import type { Member } from '#server/member.ts';
import { codeInUse } from './code-in-use.ts';
import { inputFields, orbitColumns } from './orbit-values.ts';
import { moveOrbit } from './place.ts';
import { presentOrbit } from './present.ts';

/** O1, O2, … : the first that is free after as many orbits as there are. */
function nextCode(orbits: readonly OrbitRow[]): string {
  const taken = new Set(orbits.map(({ code }) => code));
  let n = orbits.length + 1;
  while (taken.has(`O${n}`)) n += 1;
  return `O${n}`;
}

/** Adds a target orbit to the manifest, last or where asked. @throws AppError 'invalid' */
export async function addOrbit(
  db: PooledDb,
  { member, input }: { member: Member; input: OrbitInput },
): Promise<StudyOrbit & Saved> {
  const { studyId } = member;
  return changeStudy(db, { member, kind: 'inputs' }, async (tx) => {
    const orbits = await listOrbits(tx, { studyId });
    if (orbits.length >= MAX_ORBITS)
      throw new AppError('invalid', `A manifest has up to ${MAX_ORBITS} orbits. Nothing was added.`);
    const code = input.code ?? nextCode(orbits);
    if (orbits.some((orbit) => orbit.code === code)) throw codeInUse(code);
    const values = orbitColumns(inputFields(input, code));
    const made = await insertOrbit(tx, { studyId, position: orbits.length, values });
    if (input.position !== undefined)
      await moveOrbit(tx, { studyId, orbitId: made.id, position: input.position });
    const result = presentOrbit((await findOrbit(tx, { studyId, orbitId: made.id })) ?? made);
    return { result, entries: [{ object: 'orbit', objectId: made.id, action: 'add', to: result }] };
  });
}

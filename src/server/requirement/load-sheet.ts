import { MAX_PAGE_SIZE } from '#contract/list.ts';
import type { LibraryVehicle, StudyOrbit, StudySettings, StudyVehicle } from '#contract/requirement.ts';
import type { Study } from '#contract/study.ts';
import type { Db } from '#db/client.ts';
import type { Member } from '#server/member.ts';
import { readStudy } from '#server/studies/read-studies.ts';
import { listVehicles, readManifest, readSettings, readVehicle } from './read-requirement.ts';

export interface RequirementSheet {
  study: Study;
  orbits: StudyOrbit[];
  vehicle: StudyVehicle;
  settings: StudySettings;
  library: LibraryVehicle[];
}

/** All that the Requirement sheet begins with. */
export async function loadRequirement(db: Db, member: Member): Promise<RequirementSheet> {
  const { studyId } = member;
  const [study, orbits, vehicle, settings, library] = await Promise.all([
    readStudy(db, member),
    readManifest(db, { studyId }),
    readVehicle(db, { studyId }),
    readSettings(db, { studyId }),
    listVehicles(db, { query: '', page: 1, pageSize: MAX_PAGE_SIZE }),
  ]);
  return { study, orbits, vehicle, settings, library: library.items };
}

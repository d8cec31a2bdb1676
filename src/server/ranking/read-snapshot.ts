import type { Criterion, CriterionGroup } from '#contract/criterion.ts';
import type { FlownState } from '#contract/flown-results.ts';
import type { FigureParticulars } from '#contract/site.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';
import type { Weights } from '#contract/weights.ts';
import type { PooledDb } from '#db/client.ts';
import { listEnteredValues } from '#db/queries/criterion.ts';
import { countEvidence } from '#db/queries/evidence.ts';
import { inOneMoment, selectStudyInputs } from '#db/queries/study-inputs.ts';
import { readFlownStates } from '#server/ascents/flown-states.ts';
import { readGroups } from '#server/criteria/groups/read-groups.ts';
import { readCriteria } from '#server/criteria/read-criteria.ts';
import { notFound } from '#server/errors.ts';
import { presentStudyInputs } from '#server/evaluate/study-inputs.ts';
import { readWeights } from '#server/weights/read-weights.ts';

export interface Entered {
  values: Readonly<Record<string, number | string>>;
  particulars: Readonly<Record<string, FigureParticulars>>;
}

export interface EvidenceCount {
  siteId: string;
  criterionId: string;
  files: number;
}

/** Everything a ranking follows from, of one moment. */
export interface RankingSnapshot {
  inputs: StudyInputs;
  /** Flown ascents, a row a site and a state an orbit; null where the study takes entered losses. */
  flown: FlownState[][] | null;
  /** Text criteria too. */
  criteria: Criterion[];
  groups: CriterionGroup[];
  /** Entered figures and what is known of them, by site id, then by criterion id. */
  entered: ReadonlyMap<string, Entered>;
  /** How many evidence files each figure has. */
  evidence: readonly EvidenceCount[];
  study: Weights;
  mine: Weights;
}

/** @throws AppError 'not-found' */
export async function readSnapshot(
  db: PooledDb,
  { studyId, userId }: { studyId: string; userId: string },
): Promise<RankingSnapshot> {
  return inOneMoment(db, async (tx) => {
    const rows = await selectStudyInputs(tx, { studyId });
    if (!rows) throw notFound();
    const inputs = presentStudyInputs(rows);
    return {
      inputs,
      flown: rows.losses === 'flown' ? await readFlownStates(tx, inputs) : null,
      criteria: await readCriteria(tx, { studyId }),
      groups: await readGroups(tx, { studyId }),
      entered: new Map(
        (await listEnteredValues(tx, { studyId })).map(({ siteId, ...entered }) => [siteId, entered]),
      ),
      evidence: await countEvidence(tx, { studyId }),
      study: await readWeights(tx, { studyId, userId, weights: 'study' }),
      mine: await readWeights(tx, { studyId, userId, weights: 'mine' }),
    };
  });
}

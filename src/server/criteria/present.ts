import type { Criterion, CriterionLevels, CriterionLimit } from '#contract/criterion.ts';
import { isQuantity } from '#contract/quantity.ts';
import type { CriterionRow, NewCriterion } from '#db/queries/criterion.ts';

function levelsOf(row: CriterionRow): CriterionLevels {
  return row.levelMode === 'fixed' && row.worst !== null && row.best !== null
    ? { mode: 'fixed', worst: row.worst, best: row.best }
    : { mode: 'candidates' };
}

function limitOf(row: CriterionRow): CriterionLimit | null {
  return row.limitKind === null || row.limitValue === null
    ? null
    : { kind: row.limitKind, value: row.limitValue };
}

export function presentCriterion(row: CriterionRow): Criterion {
  return {
    id: row.id,
    position: row.position,
    name: row.name,
    unit: row.unit,
    direction: row.direction,
    source: row.source,
    quantity: row.quantity !== null && isQuantity(row.quantity) ? row.quantity : null,
    orbitId: row.orbitId,
    levels: levelsOf(row),
    shape: row.shape,
    groupId: row.groupId,
    steps: row.ratingSteps,
    limit: limitOf(row),
    version: row.version,
  };
}

/** Levels as columns; those of candidate-set levels are emptied, so that no stale figure stays behind. */
export function levelColumns(levels: CriterionLevels): Pick<NewCriterion, 'levelMode' | 'worst' | 'best'> {
  return levels.mode === 'fixed'
    ? { levelMode: 'fixed', worst: levels.worst, best: levels.best }
    : { levelMode: 'candidates', worst: null, best: null };
}

export function limitColumns(limit: CriterionLimit | null): Pick<NewCriterion, 'limitKind' | 'limitValue'> {
  return { limitKind: limit?.kind ?? null, limitValue: limit?.value ?? null };
}

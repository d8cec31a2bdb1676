import { faultInWords } from '#contract/figure.ts';
import { pointsStatement } from '#contract/weights.ts';
import type { WhatIfChanges } from '#contract/what-if.ts';
import { figureFaults } from '#core/decision/entered-figure.ts';
import type { Db } from '#db/client.ts';
import { listCriteria, type CriterionRow } from '#db/queries/criterion.ts';
import { findRemovedSites, findSites } from '#db/queries/site.ts';
import { AppError, type FieldError } from '#server/errors.ts';
import { checkStatement } from '#server/weights/check-statement.ts';
import { readWeighed } from '#server/weights/read-weighed.ts';

interface Known {
  criteria: ReadonlyMap<string, CriterionRow>;
  /** Sites of the study, removed ones too: an entry outlives its site. */
  siteIds: ReadonlySet<string>;
  /** Criteria that the what-if named before: an entry outlives its criterion. */
  earlier: ReadonlySet<string>;
}

const NOTHING_SAVED = 'Nothing was saved.';

/**
 * Refuses changes that name what was never the study's, or a figure its criterion cannot take.
 * @param before what the what-if held; null for a new one
 * @throws AppError 'invalid' with every fault by its path
 */
export async function checkChanges(
  tx: Db,
  { studyId, changes, before }: { studyId: string; changes: WhatIfChanges; before: WhatIfChanges | null },
): Promise<void> {
  if (changes.weights)
    checkStatement(changes.weights, {
      ...(await readWeighed(tx, { studyId })),
      before: before?.weights ?? pointsStatement({}),
    });
  const siteIds = [...new Set([...changes.figures.map(({ siteId }) => siteId), ...changes.leftOut])];
  const sites = [
    ...(await findSites(tx, { studyId, siteIds })),
    ...(await findRemovedSites(tx, { studyId, siteIds })),
  ];
  const known: Known = {
    criteria: new Map((await listCriteria(tx, { studyId })).map((row) => [row.id, row])),
    siteIds: new Set(sites.map(({ id }) => id)),
    earlier: new Set([
      ...Object.keys(before?.limits ?? {}),
      ...(before?.figures ?? []).map(({ criterionId }) => criterionId),
    ]),
  };
  const errors = [
    ...limitFaults(changes, known),
    ...figureEntryFaults(changes, known),
    ...leftOutFaults(changes, known),
  ];
  const [first] = errors;
  if (first) throw new AppError('invalid', `${first.message} ${NOTHING_SAVED}`, { errors });
}

function limitFaults({ limits }: WhatIfChanges, { criteria, earlier }: Known): FieldError[] {
  return Object.keys(limits).flatMap((id) => {
    const path = `changes.limits.${id}`;
    const criterion = criteria.get(id);
    if (criterion?.source === 'text' && !earlier.has(id))
      return [{ path, message: `${criterion.name} is a text; it carries no limit.` }];
    return criterion || earlier.has(id) ? [] : [{ path, message: 'This study has no such criterion.' }];
  });
}

function figureEntryFaults({ figures }: WhatIfChanges, known: Known): FieldError[] {
  const seen = new Set<string>();
  return figures.flatMap(({ siteId, criterionId, value }, place) => {
    const path = `changes.figures.${place}`;
    const cell = `${siteId} ${criterionId}`;
    if (seen.has(cell)) return [{ path, message: 'One figure is given twice.' }];
    seen.add(cell);
    if (!known.siteIds.has(siteId))
      return [{ path: `${path}.siteId`, message: 'This study has no such site.' }];
    const criterion = known.criteria.get(criterionId);
    if (!criterion || known.earlier.has(criterionId))
      return known.earlier.has(criterionId)
        ? valueFaults(path, criterion, value)
        : [{ path: `${path}.criterionId`, message: 'This study has no such criterion.' }];
    if (criterion.source === 'computed')
      return [{ path: `${path}.criterionId`, message: `${criterion.name} is computed; its figure follows.` }];
    if (criterion.source === 'text')
      return [{ path: `${path}.criterionId`, message: `${criterion.name} is a text and is never weighed.` }];
    return valueFaults(path, criterion, value);
  });
}

function valueFaults(path: string, criterion: CriterionRow | undefined, value: number | null): FieldError[] {
  if (value === null) return [];
  return figureFaults({ likely: value }, criterion?.source === 'rating').map((fault) => ({
    path: `${path}.value`,
    message: faultInWords(fault, { likely: value }),
  }));
}

function leftOutFaults({ leftOut }: WhatIfChanges, { siteIds }: Known): FieldError[] {
  return leftOut.flatMap((id, place) =>
    siteIds.has(id) ? [] : [{ path: `changes.leftOut.${place}`, message: 'This study has no such site.' }],
  );
}

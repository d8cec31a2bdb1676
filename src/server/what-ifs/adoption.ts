import type { FigureParticulars } from '#contract/site.ts';
import { heldParticulars, idsNamedBy } from '#contract/what-if-model.ts';
import type { WhatIfAdopted, WhatIfChanges } from '#contract/what-if.ts';
import type { CriterionRow } from '#db/queries/criterion.ts';
import type { SiteRow } from '#db/queries/site.ts';
import { patchedFigures, type Figures } from '#server/sites/entered-figures.ts';

/** What an adoption has done so far. */
export type Done = Pick<WhatIfAdopted, 'weights' | 'limits' | 'figures' | 'dropped' | 'removed'>;

interface FigureChanges {
  criterionIds: string[];
  dropped: WhatIfAdopted['dropped'];
  from: Figures;
  to: Figures;
}

const isEnterable = (criterion: CriterionRow | undefined): boolean =>
  criterion?.source === 'entered' || criterion?.source === 'rating';

/**
 * What a site's figures become; what is known of a figure stays where it still holds beside the new one.
 * @returns undefined where no figure differs
 */
export function figureChanges(
  { id: siteId, values, particulars }: Pick<SiteRow, 'id' | 'values' | 'particulars'>,
  tried: WhatIfChanges['figures'],
  criteria: readonly CriterionRow[],
): FigureChanges | undefined {
  const enterable = new Set(criteria.filter(isEnterable).map(({ id }) => id));
  const changed = tried.filter(
    (one) =>
      one.siteId === siteId &&
      enterable.has(one.criterionId) &&
      one.value !== (values[one.criterionId] ?? null),
  );
  if (changed.length === 0) return undefined;
  const held: Record<string, FigureParticulars | null> = {};
  const dropped: FigureChanges['dropped'] = [];
  for (const { criterionId, value } of changed) {
    const known = particulars[criterionId];
    if (known === undefined) continue;
    const { kept, dropped: parts } = heldParticulars(value, known);
    held[criterionId] = kept ?? null;
    if (parts.length > 0) dropped.push({ siteId, criterionId, parts });
  }
  const patch = {
    values: Object.fromEntries(changed.map(({ criterionId, value }) => [criterionId, value])),
    particulars: held,
  };
  return {
    criterionIds: changed.map(({ criterionId }) => criterionId),
    dropped,
    from: { values, particulars },
    to: patchedFigures({ values, particulars }, patch),
  };
}

interface Standing {
  criteria: readonly CriterionRow[];
  /** The named sites that are in the study. */
  sites: readonly SiteRow[];
  /** Names of what is weighed, by id. */
  names: ReadonlyMap<string, string>;
}

/** How many entries of a what-if name what is no longer there, and so are left as they are. */
export function countGone(changes: WhatIfChanges, { criteria, sites, names }: Standing): number {
  const { weights, limits, figures, leftOut } = changes;
  const byId = new Map(criteria.map((row) => [row.id, row]));
  const siteIds = new Set(sites.map(({ id }) => id));
  const gone = [
    ...(weights ? idsNamedBy(weights) : []).filter((id) => !names.has(id)),
    ...Object.keys(limits).filter((id) => (byId.get(id)?.source ?? 'text') === 'text'),
    ...figures.filter((one) => !siteIds.has(one.siteId) || !isEnterable(byId.get(one.criterionId))),
    ...leftOut.filter((id) => !siteIds.has(id)),
  ];
  return gone.length;
}

import type { CriterionGroup, CriterionGroupList } from '#contract/criterion.ts';
import type { ListQuery } from '#contract/list.ts';
import type { Db } from '#db/client.ts';
import { listGroups, type GroupRow } from '#db/queries/criterion-group.ts';

export const presentGroup = ({ id, name, version }: GroupRow): CriterionGroup => ({ id, name, version });

/** A study's groups of criteria in the order they were made. */
export async function readGroups(db: Db, scope: { studyId: string }): Promise<CriterionGroup[]> {
  return (await listGroups(db, scope)).map(presentGroup);
}

/** A page of them; a study has so few that they are cut here and not in the query. */
export async function listGroupsPage(
  db: Db,
  { studyId, query, page, pageSize }: { studyId: string } & ListQuery,
): Promise<CriterionGroupList> {
  const sought = query.toLowerCase();
  const found = (await readGroups(db, { studyId })).filter(({ name }) => name.toLowerCase().includes(sought));
  return { items: found.slice((page - 1) * pageSize, page * pageSize), total: found.length };
}

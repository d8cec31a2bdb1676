import type { WeighItem } from '#core/decision/statement.ts';
import type { Db } from '#db/client.ts';
import { listGroupNames, listWeighed } from '#db/queries/weights.ts';

export interface WeighedThings {
  items: WeighItem[];
  /** Names of weighed criteria and of groups, by id. */
  names: ReadonlyMap<string, string>;
}

/** What a study's weights are said of. */
export async function readWeighed(db: Db, { studyId }: { studyId: string }): Promise<WeighedThings> {
  const criteria = await listWeighed(db, { studyId });
  const groups = await listGroupNames(db, { studyId });
  return {
    items: criteria.map(({ id, groupId }) => ({ id, groupId })),
    names: new Map([...criteria, ...groups].map(({ id, name }) => [id, name])),
  };
}

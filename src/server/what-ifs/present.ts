import { WhatIfChanges, type WhatIf } from '#contract/what-if.ts';
import type { WhatIfRow } from '#db/queries/what-if.ts';

export function presentWhatIf(row: WhatIfRow, { userId }: { userId: string }): WhatIf {
  return {
    id: row.id,
    name: row.name,
    shared: row.shared,
    by: { userId: row.userId, name: row.by },
    mine: row.userId === userId,
    changes: WhatIfChanges.parse(row.changes),
    version: row.version,
    createdAt: row.createdAt.toISOString(),
    updatedAt: row.updatedAt.toISOString(),
  };
}

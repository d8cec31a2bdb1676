import type { ListQuery } from '#contract/list.ts';
import type { WhatIf, WhatIfList } from '#contract/what-if.ts';
import type { Db } from '#db/client.ts';
import { findWhatIf, listWhatIfs } from '#db/queries/what-if.ts';
import { AppError, notFound } from '#server/errors.ts';
import { presentWhatIf } from './present.ts';

interface Asked {
  studyId: string;
  userId: string;
}

/** A person's own what-ifs and the shared ones, latest change first. */
export async function readWhatIfs(db: Db, request: Asked & ListQuery): Promise<WhatIfList> {
  const { items, total } = await listWhatIfs(db, request);
  return { items: items.map((row) => presentWhatIf(row, request)), total };
}

/** @throws AppError 'not-found' for another's private one too */
export async function readWhatIf(db: Db, asked: Asked & { whatIfId: string }): Promise<WhatIf> {
  const row = await findWhatIf(db, asked);
  if (!row) throw notFound('There is no such what-if in this study.');
  return presentWhatIf(row, asked);
}

/** A what-if to be written over. @throws AppError 'not-found' · 'forbidden' where it is another's */
export async function readOwnWhatIf(db: Db, asked: Asked & { whatIfId: string }): Promise<WhatIf> {
  const found = await readWhatIf(db, asked);
  if (!found.mine)
    throw new AppError(
      'forbidden',
      `This what-if is ${found.by.name}’s. Keep a copy of your own to change it.`,
    );
  return found;
}

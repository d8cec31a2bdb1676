import type { MemoModel, MemoPaper } from '#contract/memo.ts';
import type { PooledDb } from '#db/client.ts';
import type { RunSensitivity } from '#server/ranking/read-sensitivity.ts';
import { loadMemoFacts } from './build-memo.ts';
import { candidatesMap } from './candidates.ts';
import { composeMemo } from './compose.ts';
import type { MapDrawing } from './map.ts';
import { outstanding, type Outstanding } from './outstanding.ts';
import { printedSites } from './printed-sites.ts';

export interface MemoPreview {
  model: MemoModel;
  /** The map drawn for the sheet on a screen and on a phone, where its letters keep their size. */
  maps: { wide: MapDrawing; narrow: MapDrawing };
  outstanding: Outstanding[];
}

const WIDE = 434;
const NARROW = 232;

/** The memo's screen: the same model that is printed, and what is outstanding. @throws AppError 'not-found' */
export async function loadPreview(
  db: PooledDb,
  asked: { studyId: string; userId: string; paper: MemoPaper; now: Date },
  run?: RunSensitivity,
): Promise<MemoPreview> {
  const facts = await loadMemoFacts(db, asked, run);
  const printed = printedSites(facts);
  const draw = (width: number) => candidatesMap(facts, printed, width);
  return {
    model: composeMemo(facts),
    maps: { wide: draw(WIDE), narrow: draw(NARROW) },
    outstanding: outstanding(facts),
  };
}

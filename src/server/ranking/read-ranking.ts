import { prepareFigures, rankFigures, type RankingModel } from '#contract/ranking-model.ts';
import { presentRanking } from '#contract/ranking-rows.ts';
import type { Ranking, RankingFigures, RankingStart } from '#contract/ranking.ts';
import type { WeightsOf } from '#contract/weights.ts';
import type { PooledDb } from '#db/client.ts';
import { rankingFigures } from './figures.ts';
import { readSnapshot } from './read-snapshot.ts';

interface Asked {
  studyId: string;
  userId: string;
}

/** Rows a page draws before its island has read the rest. */
export const FIRST_ROWS = 50;

/** A study's ranking worked out, as the memo and the pages draw it. */
export async function loadRanking(
  db: PooledDb,
  { weights, ...asked }: Asked & { weights: WeightsOf },
): Promise<RankingModel> {
  const snapshot = await readSnapshot(db, asked);
  const set = weights === 'mine' ? snapshot.mine : snapshot.study;
  return rankFigures(prepareFigures(rankingFigures(snapshot)), set);
}

/** The ranking as the interface answers it. @throws AppError 'not-found' */
export async function readRanking(db: PooledDb, asked: Asked & { weights: WeightsOf }): Promise<Ranking> {
  return presentRanking(await loadRanking(db, asked), asked.weights);
}

/** What the ranking follows from, for whoever weighs it themselves. @throws AppError 'not-found' */
export async function readFigures(db: PooledDb, asked: Asked): Promise<RankingFigures> {
  return rankingFigures(await readSnapshot(db, asked));
}

/** What a screen starts from: the first rows under the weights asked for, and both sets of weights. */
export async function readRankingStart(
  db: PooledDb,
  { weights, ...asked }: Asked & { weights: WeightsOf },
): Promise<RankingStart> {
  const snapshot = await readSnapshot(db, asked);
  const { study, mine } = snapshot;
  const model = rankFigures(prepareFigures(rankingFigures(snapshot)), weights === 'mine' ? mine : study);
  return { ranking: presentRanking(model, weights, FIRST_ROWS), study, mine };
}

import { formatDateUtc } from '#contract/format.ts';
import type { MemoModel, MemoPaper } from '#contract/memo.ts';
import { prepareFigures, rankFigures } from '#contract/ranking-model.ts';
import { decimalsOf } from '#contract/ranking-words.ts';
import { presentRanking } from '#contract/ranking-rows.ts';
import type { PooledDb } from '#db/client.ts';
import { findMemoHead } from '#db/queries/memo.ts';
import { env, publicOrigin } from '#server/env.ts';
import { notFound } from '#server/errors.ts';
import { evaluateStudy } from '#server/evaluate/evaluate-study.ts';
import { rankingFigures } from '#server/ranking/figures.ts';
import { readSnapshot } from '#server/ranking/read-snapshot.ts';
import { composeMemo } from './compose.ts';
import type { MemoFacts } from './facts.ts';
import { canonicalInputs } from './inputs.ts';
import { listedSites } from './printed-sites.ts';

interface Asked {
  studyId: string;
  /** Whoever asks; the memo is of the study's weights and says nothing of them. */
  userId: string;
}

/** What the memo is written from, with the functions that the screens use. @throws AppError 'not-found' */
export async function loadMemoFacts(
  db: PooledDb,
  { paper, now, ...asked }: Asked & { paper: MemoPaper; now: Date },
): Promise<MemoFacts> {
  const [study, snapshot] = await Promise.all([findMemoHead(db, asked), readSnapshot(db, asked)]);
  if (!study) throw notFound();
  const { inputs } = snapshot;
  const figures = rankingFigures(snapshot);
  const ranking = presentRanking(rankFigures(prepareFigures(figures), snapshot.study), 'study');
  const sites = listedSites({ ranking, inputs }).map(({ site }) => site);
  const flights = evaluateStudy({ ...inputs, sites });
  return {
    paper,
    date: formatDateUtc(now),
    origin: publicOrigin(env()),
    study,
    inputs,
    results: new Map(sites.flatMap(({ siteId }, at) => (flights[at] ? [[siteId, flights[at]]] : []))),
    decimals: figures.criteria.map((_, place) => decimalsOf(figures, place)),
    ranking,
    checksum: canonicalInputs(snapshot).checksum,
  };
}

/** The study's memo as it stands now. @throws AppError 'not-found' */
export async function buildMemo(
  db: PooledDb,
  asked: Asked & { paper: MemoPaper; now: Date },
): Promise<MemoModel> {
  return composeMemo(await loadMemoFacts(db, asked));
}

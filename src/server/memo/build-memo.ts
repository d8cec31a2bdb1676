import type { SiteResult } from '#contract/evaluate.ts';
import { flownSite } from '#contract/flown-results.ts';
import type { InputSite } from '#contract/study-inputs.ts';
import { formatDateUtc } from '#contract/format.ts';
import { MAX_PAGE_SIZE } from '#contract/list.ts';
import type { MemoModel, MemoPaper } from '#contract/memo.ts';
import { prepareFigures, rankFigures } from '#contract/ranking-model.ts';
import { decimalsOf } from '#contract/ranking-words.ts';
import { presentRanking } from '#contract/ranking-rows.ts';
import type { PooledDb } from '#db/client.ts';
import { listEvidence } from '#db/queries/evidence.ts';
import { findMemoHead } from '#db/queries/memo.ts';
import { env, publicOrigin } from '#server/env.ts';
import { notFound } from '#server/errors.ts';
import { evaluateStudy } from '#server/evaluate/evaluate-study.ts';
import { agreementOf } from '#contract/agreement-model.ts';
import { DrawQuery, type Sensitivity } from '#contract/sensitivity.ts';
import { rankingFigures } from '#server/ranking/figures.ts';
import { runSensitivity, type RunSensitivity } from '#server/ranking/read-sensitivity.ts';
import { readSnapshot, type RankingSnapshot } from '#server/ranking/read-snapshot.ts';
import { readMemberWeights } from '#server/weights/member-weights.ts';
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
  run: RunSensitivity = runSensitivity,
): Promise<MemoFacts> {
  const [study, snapshot, { items: members }, evidence] = await Promise.all([
    findMemoHead(db, asked),
    readSnapshot(db, asked),
    readMemberWeights(db, asked),
    listEvidence(db, { ...asked, query: '', page: 1, pageSize: MAX_PAGE_SIZE }),
  ]);
  if (!study) throw notFound();
  const { inputs } = snapshot;
  const figures = rankingFigures(snapshot);
  const ready = prepareFigures(figures);
  const ranking = presentRanking(rankFigures(ready, snapshot.study), 'study');
  const query = DrawQuery.parse({});
  const drawn = await run({ figures, statement: snapshot.study, weights: 'study', query });
  const sites = listedSites({ ranking, inputs }).map(({ site }) => site);
  const flown = flownOf(snapshot, sites);
  const flights = flightsOf(snapshot, sites, flown);
  return {
    paper,
    date: formatDateUtc(now),
    origin: publicOrigin(env()),
    study,
    inputs,
    flown,
    results: new Map(sites.flatMap(({ siteId }, at) => (flights[at] ? [[siteId, flights[at]]] : []))),
    decimals: figures.criteria.map((_, place) => decimalsOf(figures, place)),
    ranking,
    figures,
    groups: snapshot.groups,
    weights: snapshot.study,
    sensitivity: JSON.parse(new TextDecoder().decode(drawn)) as Sensitivity,
    evidence: { files: evidence.items, total: evidence.total },
    members: agreementOf(ready, members),
    checksum: canonicalInputs(snapshot).checksum,
  };
}

type Flown = MemoFacts['flown'];

function flownOf({ inputs, flown }: RankingSnapshot, sites: readonly InputSite[]): Flown {
  if (flown === null) return null;
  const bySite = new Map(inputs.sites.map(({ siteId }, at) => [siteId, flown[at] ?? []]));
  return new Map(sites.map(({ siteId }) => [siteId, bySite.get(siteId) ?? []]));
}

function flightsOf({ inputs }: RankingSnapshot, sites: InputSite[], flown: Flown): SiteResult[] {
  const flightsPerYear = inputs.orbits.map((orbit) => orbit.flightsPerYear);
  return evaluateStudy({ ...inputs, sites }).map((result, at) => {
    const states = flown?.get(sites[at]?.siteId ?? '');
    return states ? flownSite(result, states, flightsPerYear) : result;
  });
}

/** The study's memo as it stands now. @throws AppError 'not-found' */
export async function buildMemo(
  db: PooledDb,
  asked: Asked & { paper: MemoPaper; now: Date },
  run: RunSensitivity = runSensitivity,
): Promise<MemoModel> {
  return composeMemo(await loadMemoFacts(db, asked, run));
}

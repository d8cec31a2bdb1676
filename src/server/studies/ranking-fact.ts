import { formatCount } from '#contract/format.ts';
import type { SectionFrame } from '#contract/frame.ts';
import type { PooledDb } from '#db/client.ts';
import { loadRanking } from '#server/ranking/read-ranking.ts';

export type Fact = Pick<SectionFrame, 'fact' | 'outstanding'>;

interface Asked {
  studyId: string;
  userId: string;
  revision: number;
  sites: number;
  orbits: number;
  criteria: number;
  /** Whether the study's weights are set. */
  weighted: boolean;
  /** Sites that lack a figure of an entered criterion. */
  gaps: number;
}

/** Above this many flights a page does not wait for the ranking; what is missing is then only counted. */
const MOST_FLIGHTS = 2_000;

/** The last facts by study: under the study's weights they follow from its revision alone. */
const known = new Map<string, { revision: number; fact: Fact }>();
const MOST_KNOWN = 500;

function keep(studyId: string, revision: number, fact: Fact): Fact {
  known.delete(studyId);
  known.set(studyId, { revision, fact });
  const [oldest] = known.keys();
  if (known.size > MOST_KNOWN && oldest !== undefined) known.delete(oldest);
  return fact;
}

/** What one would look for first: what is missing, then what failed a limit, then how many are ranked. */
function inWords({
  ranked,
  incomplete,
  setAside,
}: Record<'ranked' | 'incomplete' | 'setAside', number>): Fact {
  if (incomplete > 0) return { fact: `${incomplete} incomplete`, outstanding: true };
  return {
    fact: setAside > 0 ? `${ranked} ranked, ${setAside} set aside` : `${ranked} ranked`,
    outstanding: false,
  };
}

/** The Ranking section's line of fact, under the study's weights. */
export async function rankingFact(db: PooledDb, asked: Asked): Promise<Fact> {
  const { studyId, userId, revision, sites, orbits, criteria, weighted, gaps } = asked;
  if (sites === 0 || criteria === 0 || !weighted) return { fact: 'nothing to rank', outstanding: true };
  if (sites * Math.max(1, orbits) > MOST_FLIGHTS)
    return gaps > 0
      ? { fact: `${formatCount(gaps, 'site')} without a figure`, outstanding: true }
      : { fact: `${formatCount(sites, 'site')} weighed`, outstanding: false };
  const last = known.get(studyId);
  if (last?.revision === revision) return last.fact;
  const { table } = await loadRanking(db, { studyId, userId, weights: 'study' });
  return keep(
    studyId,
    revision,
    inWords({
      ranked: table.ranked.length,
      incomplete: table.incomplete.length,
      setAside: table.setAside.length,
    }),
  );
}

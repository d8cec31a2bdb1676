import { formatCount, formatNumber, listInWords } from '#contract/format.ts';
import type { MemoHeadline, MemoModel, MemoText } from '#contract/memo.ts';
import type { RankedSite, Ranking } from '#contract/ranking.ts';
import { letterOf, valueDecimals } from '#contract/ranking-words.ts';
import { shareInWords } from '#contract/share-words.ts';
import type { MemoFacts } from './facts.ts';
import { recommendation } from './recommendation.ts';

type Opening = Pick<MemoModel, 'finding' | 'question' | 'reasons' | 'headline'>;

const day = new Intl.DateTimeFormat('en-GB', { dateStyle: 'long', timeZone: 'UTC' });

function questionOf({ study }: MemoFacts): string {
  const asked =
    study.question === '' ? 'The question is not written down yet.' : `The question: ${study.question}`;
  const by =
    study.decideBy === null
      ? 'No day is set to decide it by.'
      : `To be decided by ${day.format(new Date(`${study.decideBy}T00:00:00Z`))}.`;
  return `${asked} ${by}`;
}

/** What there is to say before there are ranks: what is missing, and where it is entered. */
const UNRANKED: Record<Exclude<Ranking['state'], 'ranked'>, { finding: string; why: string }> = {
  'no-sites': {
    finding: 'No recommendation: the study has no candidate sites yet',
    why: 'Candidates are added on the Sites sheet, by typing coordinates, on the map or from a CSV. What is known of the requirement follows.',
  },
  'no-criteria': {
    finding: 'No recommendation: there is nothing to weigh the candidates by yet',
    why: 'Criteria are added on the Criteria sheet. The candidates and what each gives in flight follow.',
  },
  'no-weights': {
    finding: 'No recommendation: the criteria have no weights yet',
    why: 'The study’s weights are set by its lead on the Criteria sheet. The candidates and what each gives in flight follow.',
  },
};

const NAMED = 3;
const namesOf = (sites: readonly { name: string }[]): string =>
  sites.length <= NAMED
    ? listInWords(sites.map(({ name }) => name))
    : `${sites
        .slice(0, NAMED - 1)
        .map(({ name }) => name)
        .join(', ')} and ${sites.length - NAMED + 1} others`;

function findingOf(ranking: Ranking): string {
  if (ranking.state !== 'ranked') return UNRANKED[ranking.state].finding;
  const leaders = ranking.ranked.filter(({ rank }) => rank === 1);
  if (leaders.length === 0) return 'No recommendation: no candidate can be ranked';
  return leaders.length === 1 ? `Fly from ${namesOf(leaders)}` : `${namesOf(leaders)} share the first place`;
}

/** Where two sites part: the criteria whose terms differ most, one way and the other. */
function partings(ranking: Ranking, leader: RankedSite, second: RankedSite, value: (v: number) => string) {
  const pairs = ranking.criteria.map(({ name }, at) => ({
    name: `${name} (${letterOf(at)})`,
    own: leader.contributions[at]?.term ?? 0,
    other: second.contributions[at]?.term ?? 0,
  }));
  const say = ({ name, own, other }: (typeof pairs)[number]) =>
    `${name}, ${value(own)} against ${value(other)}`;
  const sorted = [...pairs].sort((a, b) => b.own - b.other - (a.own - a.other));
  return {
    ahead: sorted
      .filter(({ own, other }) => own > other)
      .slice(0, 2)
      .map(say),
    behind: sorted
      .toReversed()
      .filter(({ own, other }) => own < other)
      .slice(0, 1)
      .map(say),
  };
}

function leaderReason(facts: MemoFacts): MemoText | null {
  const { ranking } = facts;
  const [leader, second] = ranking.ranked;
  if (!leader) return null;
  const value = (v: number): string => formatNumber(v, valueDecimals(ranking));
  const { what } = recommendation(facts);
  if (!second) return [{ strong: what }];
  const { ahead, behind } = partings(ranking, leader, second, value);
  return [
    { strong: what },
    ahead.length > 0 ? ` ${leader.name} is ahead of ${second.name} on ${listInWords(ahead)}.` : '',
    behind.length > 0 ? ` ${second.name} is ahead on ${listInWords(behind)}.` : '',
  ];
}

/** Every site lacks a figure or fails a limit. */
function whyNone({ counts }: Ranking): string {
  const parts = [
    ...(counts.incomplete > 0
      ? [`${formatCount(counts.incomplete, 'site')} ${counts.incomplete === 1 ? 'lacks' : 'lack'} a figure`]
      : []),
    ...(counts.setAside > 0
      ? [
          `${formatCount(counts.setAside, 'site')} ${counts.setAside === 1 ? 'fails' : 'fail'} a must-meet limit`,
        ]
      : []),
  ];
  return `${listInWords(parts)}; each is listed with its reason under Criteria and ranking.`;
}

/** What flying from the leader means for the manifest. */
function manifestReason(facts: MemoFacts): MemoText | null {
  const leader = facts.ranking.ranked[0];
  const orbits = facts.results.get(leader?.siteId ?? '')?.orbits ?? [];
  if (!leader || orbits.length === 0) return null;
  const named = (failing: (orbit: (typeof orbits)[number]) => boolean): string[] =>
    orbits.flatMap((orbit, at) => (failing(orbit) ? [facts.inputs.orbits[at]?.name || orbit.code] : []));
  const unreached = named(({ way }) => way === 'out-of-reach');
  const short = named(({ shortfallMps }) => shortfallMps !== null);
  const turned = named(({ way }) => way === 'dogleg' || way === 'plane-change');
  const parts = [
    ...(unreached.length > 0
      ? [`${listInWords(unreached)} ${unreached.length === 1 ? 'is' : 'are'} out of reach`]
      : []),
    ...(short.length > 0 ? [`the vehicle falls short for ${listInWords(short)}`] : []),
    ...(turned.length > 0 ? [`${listInWords(turned)} ${turned.length === 1 ? 'needs' : 'need'} a turn`] : []),
  ];
  return [
    parts.length === 0
      ? `From ${leader.name} the whole manifest is flown directly, without a turn.`
      : `From ${leader.name}, ${listInWords(parts)}; every other orbit is flown directly.`,
  ];
}

function headlineOf({
  ranking,
  results,
  inputs,
  sensitivity: { acceptability: drawn },
}: MemoFacts): MemoHeadline[] {
  const { counts, margin, ranked } = ranking;
  const leader = ranked[0];
  if (!leader) return [];
  const payload = results.get(leader.siteId)?.payloadPerYearKg ?? null;
  const flights = inputs.orbits.reduce((sum, orbit) => sum + orbit.flightsPerYear, 0);
  const all = counts.ranked + counts.incomplete + counts.setAside;
  return [
    ...(margin === null
      ? []
      : [
          {
            label: 'Margin over the runner-up',
            figure: formatNumber(margin, valueDecimals(ranking)),
            note: '',
            leads: true,
          },
        ]),
    ...(payload === null || flights === 0
      ? []
      : [
          {
            label: `Payload a year from ${leader.name}`,
            figure: `${formatNumber(payload / 1000, 1)} t`,
            note: formatCount(flights, 'flight'),
            leads: false,
          },
        ]),
    drawn
      ? {
          label: `${leader.name} comes first in`,
          figure: shareInWords(drawn.sites[0]?.shares[0] ?? 0, drawn.samples),
          note: `of ${formatNumber(drawn.samples)} draws`,
          leads: false,
        }
      : {
          label: 'Candidates ranked',
          figure: formatNumber(counts.ranked),
          note: `of ${formatNumber(all)}`,
          leads: false,
        },
  ];
}

/** The first page's head: recommendation, question, why, and the figures that carry it. */
export function opening(facts: MemoFacts): Opening {
  const { ranking } = facts;
  const reasons =
    ranking.state === 'ranked'
      ? [leaderReason(facts) ?? [whyNone(ranking)], manifestReason(facts)].filter((text) => text !== null)
      : [[UNRANKED[ranking.state].why]];
  return { finding: findingOf(ranking), question: questionOf(facts), reasons, headline: headlineOf(facts) };
}

import { nameOf } from '#components/flight/words.ts';
import type { OrbitResult, SiteResult } from '#contract/evaluate.ts';
import { formatCount, formatNumber, listInWords } from '#contract/format.ts';
import type { Site, SiteList } from '#contract/site.ts';
import type { InputOrbit, StudyInputs } from '#contract/study-inputs.ts';
import { flySites } from './flights.ts';

/** The screen's result. `leader` is the one site that does what no other does, set in signal where it stands. */
export interface SitesFinding {
  readonly before: string;
  readonly leader: string | null;
  readonly after: string;
  readonly why: string;
}

const numbers = [
  'No',
  'One',
  'Two',
  'Three',
  'Four',
  'Five',
  'Six',
  'Seven',
  'Eight',
  'Nine',
  'Ten',
  'Eleven',
  'Twelve',
];

/** "Nine candidates.", "1,240 candidates." */
export function countInWords(count: number): string {
  return `${numbers[count] ?? formatNumber(count)} ${count === 1 ? 'candidate' : 'candidates'}.`;
}

export const textOf = ({ before, leader, after }: SitesFinding): string => `${before}${leader ?? ''}${after}`;

const isDirect = (result: OrbitResult): boolean => result.way === 'direct';

function few(names: readonly string[]): string {
  return names.length <= 3 ? listInWords(names) : formatCount(names.length, 'site');
}

/** The orbit that costs most sites a turn, and which they are. */
function turnsClause(
  flown: readonly { site: Site; result: SiteResult }[],
  orbits: readonly InputOrbit[],
): string {
  const byOrbit = orbits.map((orbit, index) => {
    const results = flown.flatMap(({ site, result }) => {
      const one = result.orbits[index];
      return one ? [{ name: site.name, one }] : [];
    });
    const out = results.filter(({ one }) => one.way === 'out-of-reach').map(({ name }) => name);
    const turned = results
      .filter(({ one }) => !isDirect(one) && one.way !== 'out-of-reach')
      .map(({ name }) => name);
    return { orbit, inclinationDeg: results[0]?.one.inclinationDeg ?? 0, out, turned };
  });
  const worst = byOrbit.sort((a, b) => b.turned.length + b.out.length - (a.turned.length + a.out.length))[0];
  if (!worst || worst.turned.length + worst.out.length === 0) return '';
  const { turned, out } = worst;
  const clauses = [
    turned.length > 0 && `${few(turned)} ${turned.length === 1 ? 'owes' : 'owe'} a turn or a plane change`,
    out.length > 0 && `for ${few(out)} it is out of reach`,
  ].filter((clause) => clause !== false);
  return `To ${nameOf(worst.orbit)} at ${formatNumber(worst.inclinationDeg, 1)}°: ${clauses.join('; ')}.`;
}

function directClause(direct: readonly Site[], all: number): Pick<SitesFinding, 'leader' | 'after'> {
  const does = 'every orbit without a turn.';
  const [first] = direct;
  if (!first) return { leader: null, after: `None flies ${does}` };
  if (all === 1) return { leader: null, after: `${first.name} flies ${does}` };
  if (direct.length === 1) return { leader: first.name, after: ` flies ${does}` };
  if (direct.length === all) return { leader: null, after: `Each flies ${does}` };
  return { leader: null, after: `${few(direct.map(({ name }) => name))} fly ${does}` };
}

/** How many candidates there are, and which of them fly the whole manifest without a turn. */
export function sitesFinding(
  sites: readonly Site[],
  total: number,
  orbits: readonly InputOrbit[] | null,
  results: ReadonlyMap<string, SiteResult>,
): SitesFinding {
  if (total === 0) return { before: 'No sites yet.', leader: null, after: '', why: '' };
  const count = countInWords(total);
  if (orbits?.length === 0)
    return {
      before: count,
      leader: null,
      after: '',
      why: 'Add target orbits in Requirement to see what each of them can fly.',
    };
  const flown = sites.flatMap((site) => {
    const result = results.get(site.id);
    return result ? [{ site, result }] : [];
  });
  if (!orbits || flown.length < total) return { before: count, leader: null, after: '', why: '' };
  const direct = flown.filter(({ result }) => result.orbits.every(isDirect)).map(({ site }) => site);
  return { before: `${count} `, ...directClause(direct, total), why: turnsClause(flown, orbits) };
}

/** The finding in plain text as the page is first drawn: its title. */
export function firstFinding({ items, total }: SiteList, inputs: StudyInputs | null): string {
  const results =
    inputs && inputs.orbits.length > 0 && items.length > 0
      ? flySites(inputs, items)
      : new Map<string, SiteResult>();
  return textOf(sitesFinding(items, total, inputs?.orbits ?? null, results));
}

import { formatCount, listInWords } from '#contract/format.ts';
import { missingInWords } from '#contract/ranking-words.ts';
import type { SectionKey } from '#contract/frame.ts';
import type { MemoFacts } from './facts.ts';

/** Something to settle before the memo says all it could, and the section where that is done. */
export interface Outstanding {
  /** As it stands within a sentence. */
  text: string;
  section: SectionKey;
}

/** Sites named one by one; more are counted. */
const NAMED = 4;

function incompleteSites({ ranking }: MemoFacts): Outstanding[] {
  const { incomplete } = ranking;
  if (incomplete.length > NAMED)
    return [{ text: `${formatCount(incomplete.length, 'site')} lack a figure`, section: 'sites' }];
  return incomplete.map((site) => ({
    text: `${site.name} has ${missingInWords(ranking, site.missing)}`,
    section: 'sites',
  }));
}

/** What is outstanding, in the order of the work. */
export function outstanding(facts: MemoFacts): Outstanding[] {
  const { study, inputs, ranking } = facts;
  const missing = (gone: boolean, text: string, section: SectionKey): Outstanding[] =>
    gone ? [{ text, section }] : [];
  return [
    ...missing(study.question === '', 'the question is not written down', 'requirement'),
    ...missing(study.decideBy === null, 'no day is set to decide it by', 'requirement'),
    ...missing(inputs.orbits.length === 0, 'the manifest has no orbits', 'requirement'),
    ...missing(inputs.vehicle === null, 'no vehicle is chosen', 'requirement'),
    ...missing(ranking.state === 'no-sites', 'there are no candidate sites', 'sites'),
    ...missing(ranking.state === 'no-criteria', 'there are no criteria', 'criteria'),
    ...missing(ranking.state === 'no-weights', 'the study’s weights are not set', 'criteria'),
    ...incompleteSites(facts),
    ...missing(
      ranking.state === 'ranked' && ranking.counts.ranked === 0 && ranking.counts.setAside > 0,
      'every site with all its figures fails a limit',
      'criteria',
    ),
  ];
}

const COUNTS = ['One thing', 'Two things', 'Three things', 'Four things', 'Five things'];

/** "Two things to settle first: …", or nothing. */
export function outstandingInWords(items: readonly Outstanding[]): { lead: string; rest: string } | null {
  if (items.length === 0) return null;
  const texts = items.slice(0, NAMED).map(({ text }) => text);
  const more = items.length > NAMED ? [`${items.length - NAMED} more`] : [];
  const lead = `${COUNTS[items.length - 1] ?? `${items.length} things`} to settle first:`;
  return { lead, rest: `${listInWords([...texts, ...more])}.` };
}

import { formatCount, formatDateTimeUtc, formatNumber } from '#contract/format.ts';
import { STATE_NAMES } from '#contract/frame.ts';
import type { StudyList, StudyListQuery, StudyRole } from '#contract/study.ts';

export const ROLE_NAMES: Record<StudyRole, string> = {
  lead: 'Lead',
  engineer: 'Engineer',
  reviewer: 'Reviewer',
  reader: 'Reader',
};

export const isFiltered = ({ query, state, archived }: StudyListQuery): boolean =>
  query !== '' || state !== undefined || archived !== 'false';

/** What is being looked for, in words: "in review", "holding “coast”". */
function filterInWords({ query, state, archived }: StudyListQuery): string {
  const parts = [
    state && STATE_NAMES[state].toLowerCase(),
    archived === 'true' && 'archived',
    archived === 'all' && 'archived or not',
    query && `holding “${query}”`,
  ];
  return parts.filter(Boolean).join(', ');
}

/** The sentence the screen opens with. */
export function studiesFinding({ total }: StudyList, query: StudyListQuery): string {
  if (isFiltered(query))
    return total === 0
      ? `No study is ${filterInWords(query)}.`
      : `${formatCount(total, 'study is', 'studies are')} ${filterInWords(query)}.`;
  if (total === 0) return 'No studies yet.';
  return `You are a member of ${formatCount(total, 'study', 'studies')}.`;
}

/** Which one changed last, in a line of why. */
export function lastChange({ items }: StudyList, { page }: StudyListQuery): string | null {
  const [latest] = items;
  if (!latest || page !== 1) return null;
  return `${latest.title} changed last, ${formatDateTimeUtc(latest.updatedAt)}, at revision ${formatNumber(latest.revision)}.`;
}

/** What a page frame shows around a study's section: the view types that the layouts take. */
import type { StudyRole, StudyState } from './study.ts';

/** The sections of a study that exist, in the order of the work. A section that is not built has no key. */
export const SECTION_KEYS = [
  'requirement',
  'sites',
  'flight',
  'downrange',
  'criteria',
  'ranking',
  'memo',
] as const;
export type SectionKey = (typeof SECTION_KEYS)[number];

export interface SectionFrame {
  key: SectionKey;
  name: string;
  href: string;
  /** One line under the name: "9 candidates", "1 over its limit". */
  fact: string;
  /** Something is to be settled here: the station is drawn hollow. */
  outstanding: boolean;
}

export interface ViewerFrame {
  name: string;
  initials: string;
  administrator: boolean;
}

export interface StudyFrame {
  study: {
    id: string;
    title: string;
    organisation: string;
    state: StudyState;
    revision: number;
    /** ISO 8601, UTC: when the revision was committed. */
    savedAt: string;
    role: StudyRole;
    archived: boolean;
  };
  viewer: ViewerFrame;
  sections: SectionFrame[];
}

export const STATE_NAMES: Record<StudyState, string> = {
  draft: 'Draft',
  'in-review': 'In review',
  baselined: 'Baselined',
};

/** Why this viewer can't change the study's inputs now, in words; null where they can. The server decides again. */
export function inputsLock({ study }: StudyFrame): string | null {
  if (study.role === 'reader' || study.role === 'reviewer')
    return 'A lead or an engineer changes the inputs. You may filter, export and compute.';
  if (study.archived) return 'The study is archived. Restore it to change its inputs.';
  if (study.state === 'in-review') return 'The study is in review: its inputs are locked.';
  if (study.state === 'baselined' && study.role !== 'lead')
    return 'After a baseline the lead makes the next change.';
  return null;
}

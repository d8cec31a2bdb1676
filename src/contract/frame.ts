/** What a page frame shows around a study's section: the view types that the layouts take. */
import type { StudyRole, StudyState } from './study.ts';

/** The sections of a study that exist, in the order of the work. A section that is not built has no key. */
export const SECTION_KEYS = ['requirement', 'sites', 'flight', 'criteria', 'ranking', 'memo'] as const;
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

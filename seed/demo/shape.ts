import type { CriterionDraft } from '#contract/criterion.ts';
import type { OrbitDraft } from '#contract/requirement.ts';
import type { FigureParticulars, SiteDraft } from '#contract/site.ts';
import type { StudyRole } from '#contract/study.ts';

/** A person of the demo; the sign-in is `${login}@spinward.test`. */
export interface DemoPerson {
  login: string;
  name: string;
  administrator?: boolean;
}

/**
 * A criterion as the interface takes it, under a key that figures and points refer to, its orbit named by code and its
 * group by name; a group is there as soon as a criterion is in it, and no criterion's key is its name.
 */
export type DemoCriterion = DistributiveOmit<CriterionDraft, 'orbitId' | 'groupId'> & {
  key: string;
  orbitCode?: string;
  group?: string;
};

type DistributiveOmit<T, K extends string> = T extends unknown ? Omit<T, K> : never;

/** A site as the interface takes it, its entered figures and their particulars by criterion key. */
export type DemoSite = Omit<SiteDraft, 'values' | 'particulars'> & {
  code: string;
  values?: Record<string, number | string>;
  particulars?: Record<string, FigureParticulars>;
};

/** A study of the demo, in the interface's own shapes; the loader checks it by the same schemas. */
export interface DemoStudy {
  title: string;
  organisation: string;
  question: string;
  /** ISO day. */
  decideBy: string | null;
  /** Code of the library's vehicle it flies. */
  vehicleCode: string;
  members: { login: string; role: StudyRole }[];
  orbits: (OrbitDraft & { code: string })[];
  criteria: DemoCriterion[];
  sites: DemoSite[];
  /** The study's points by criterion key and group name. */
  points: Record<string, number>;
  /** Members' own sets. */
  ownPoints: { login: string; shared?: boolean; points: Record<string, number> }[];
}

/** What seed/demo/scenario.ts exports as `scenario`. The first study is the example that new studies can be made from. */
export interface Scenario {
  people: DemoPerson[];
  studies: [DemoStudy, ...DemoStudy[]];
}

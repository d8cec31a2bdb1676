import type { InputSite, StudyInputs } from '#contract/study-inputs.ts';

/** The site whose code the address has, else the first. */
export const siteFrom = ({ sites }: StudyInputs, code: string | null): InputSite | undefined =>
  sites.find((site) => site.code === code) ?? sites[0];

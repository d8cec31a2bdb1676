import type { StudyInputs } from '#contract/study-inputs.ts';
import { siteFrom } from './site.ts';

/** The page's title until the corridor has been worked out. */
export function firstHeading(inputs: StudyInputs | null, code: string | null): string {
  if (!inputs) return 'Downrange';
  const site = siteFrom(inputs, code);
  return site ? `Downrange of ${site.name}` : 'No sites yet.';
}

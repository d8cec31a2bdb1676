import { useMemo } from 'react';
import type { StudyInputs } from '#contract/study-inputs.ts';
import { flownRows, flownYears } from './results.ts';
import { useAscents } from './use-ascents.ts';

/** The study's flown ascents as a sheet shows them. @param orbitIndex place in the manifest; −1 for all of it */
export function useFlown(studyId: string, inputs: StudyInputs, orbitIndex: number) {
  const { sites, orbits } = inputs;
  const orbit = orbits[orbitIndex] ?? null;
  const ascents = useAscents(studyId, orbit?.orbitId ?? null);
  const { items } = ascents;
  const rows = useMemo(() => (orbit ? flownRows(sites, items, orbit.orbitId) : []), [sites, items, orbit]);
  const years = useMemo(() => (orbit ? [] : flownYears(sites, orbits, items)), [sites, orbits, items, orbit]);
  const reading =
    !ascents.error && (orbit ? rows.every(({ ascent }) => ascent === undefined) : items.length === 0);
  return { orbit, ascents, rows, years, reading };
}

import { useMemo } from 'react';
import type { MapTrack } from '#components/map/types.ts';
import type { OrbitResult, SiteResult } from '#contract/evaluate.ts';
import type { Site } from '#contract/site.ts';
import type { InputOrbit, StudyInputs } from '#contract/study-inputs.ts';
import { flySites, MOST_RESULTS, orbitTitle, trackOf } from './flights.ts';

/** More tracks than this would hide the map under them. */
const MOST_TRACKS = 40;

export interface SiteFlights {
  readonly results: ReadonlyMap<string, SiteResult>;
  readonly orbit: InputOrbit | null;
  /** Of the chosen site to the orbit looked at. */
  readonly flight: { title: string; result: OrbitResult } | null;
  readonly tracks: readonly MapTrack[];
}

interface Looked {
  sites: readonly Site[];
  inputs: StudyInputs | null;
  orbitCode: string | null;
  chosen: Site | undefined;
  others: boolean;
}

/** What the sites fly, by the code that the server runs: all of them, or the chosen one where they are very many. */
export function useFlights({ sites, inputs, orbitCode, chosen, others }: Looked): SiteFlights {
  const orbits = inputs?.orbits;
  const many = sites.length * (orbits?.length ?? 0) > MOST_RESULTS;
  const only = many ? chosen : undefined;
  const results = useMemo(() => {
    if (!inputs || inputs.orbits.length === 0) return new Map<string, SiteResult>();
    const flown = many ? (only ? [only] : []) : sites;
    return flown.length > 0 ? flySites(inputs, flown) : new Map<string, SiteResult>();
  }, [inputs, sites, many, only]);
  const index = Math.max(0, orbits?.findIndex(({ code }) => code === orbitCode) ?? 0);
  const orbit = orbits?.[index] ?? null;

  return useMemo(() => {
    const resultOf = (site: Site | undefined) => site && results.get(site.id)?.orbits[index];
    const chosenResult = resultOf(chosen);
    const drawn = others ? sites.slice(0, MOST_TRACKS) : [];
    const withChosen = chosen && !drawn.includes(chosen) ? [...drawn, chosen] : drawn;
    const tracks = withChosen.flatMap((site) => {
      const result = resultOf(site);
      const track = orbit && result ? trackOf(site, orbit, result) : null;
      return track ? [track] : [];
    });
    const flight =
      orbit && chosenResult ? { title: orbitTitle(orbit, chosenResult), result: chosenResult } : null;
    return { results, orbit, flight, tracks };
  }, [results, index, orbit, chosen, sites, others]);
}

import type { Criterion } from '#contract/criterion.ts';
import type { SiteResult } from '#contract/evaluate.ts';
import { flownSite } from '#contract/flown-results.ts';
import type { RankingFigures } from '#contract/ranking.ts';
import type { InputSite, StudyInputs } from '#contract/study-inputs.ts';
import { toSite } from '#contract/to-core.ts';
import { lowestInclination } from '#core/flight/lowest-inclination.ts';
import { circularSpeed, radiusOf } from '#core/flight/orbit.ts';
import { padOf } from '#core/flight/pad.ts';
import { fromKilometres, toDegrees } from '#core/units.ts';
import { evaluateStudy } from '#server/evaluate/evaluate-study.ts';
import { computedFigure, type ComputedFigure, type SiteFlight } from './computed-figure.ts';
import type { RankingSnapshot } from './read-snapshot.ts';

/** The circular orbit that the lowest inclination is flown into. */
const REFERENCE_ALTITUDE_KM = 185;

/** Figures of every site under every weighed criterion, computed and entered. */
export function rankingFigures({
  inputs,
  flown,
  criteria,
  entered,
  evidence,
}: RankingSnapshot): RankingFigures {
  const weighed = criteria.filter(({ source }) => source !== 'text');
  const flights = weighed.some(({ source }) => source === 'computed') ? flightsOf(inputs, flown) : [];
  const notes: RankingFigures['notes'] = [];
  const cells = inputs.sites.map(({ siteId }, site) =>
    weighed.map((criterion, place) => {
      const flight = flights[site];
      const { cell, note }: ComputedFigure =
        criterion.source === 'entered' || criterion.source === 'rating'
          ? enteredFigure(entered.get(siteId)?.values[criterion.id])
          : flight
            ? computedFigure(criterion, orbitIndexOf(inputs, criterion), flight)
            : { cell: null };
      if (note !== undefined) notes.push([site, place, note]);
      return cell;
    }),
  );
  const sites = inputs.sites.map(({ siteId, code, name, latitudeDeg, longitudeDeg }) => ({
    siteId,
    code,
    name,
    latitudeDeg,
    longitudeDeg,
  }));
  const particulars = inputs.sites.flatMap(({ siteId }, site) =>
    weighed.flatMap(({ id }, place): RankingFigures['particulars'] => {
      const known = entered.get(siteId)?.particulars[id];
      return known === undefined ? [] : [[site, place, known]];
    }),
  );
  return {
    revision: inputs.revision,
    criteria: weighed,
    sites,
    cells,
    notes,
    particulars,
    evidence: evidencePlaces(evidence, sites, weighed),
  };
}

/** Counts of files by the places of their figures; a site or criterion that is not weighed has none. */
function evidencePlaces(
  counts: RankingSnapshot['evidence'],
  sites: readonly { siteId: string }[],
  criteria: readonly Criterion[],
): RankingFigures['evidence'] {
  const siteAt = new Map(sites.map(({ siteId }, place) => [siteId, place]));
  const criterionAt = new Map(criteria.map(({ id }, place) => [id, place]));
  return counts.flatMap(({ siteId, criterionId, files }): RankingFigures['evidence'] => {
    const site = siteAt.get(siteId);
    const criterion = criterionAt.get(criterionId);
    return site === undefined || criterion === undefined ? [] : [[site, criterion, files]];
  });
}

/** Text under a criterion that is weighed is kept as it was given and is no figure. */
function enteredFigure(value: number | string | undefined): ComputedFigure {
  return typeof value === 'number' ? { cell: value } : { cell: null };
}

/** The place of a criterion's orbit in the manifest; past its end where the orbit is gone. */
function orbitIndexOf({ orbits }: StudyInputs, { orbitId }: Criterion): number | null {
  if (orbitId === null) return null;
  const index = orbits.findIndex((orbit) => orbit.orbitId === orbitId);
  return index < 0 ? orbits.length : index;
}

function flightsOf(inputs: StudyInputs, flown: RankingSnapshot['flown']): SiteFlight[] {
  const speed = circularSpeed(radiusOf(fromKilometres(REFERENCE_ALTITUDE_KM)));
  const flightsPerYear = inputs.orbits.map((orbit) => orbit.flightsPerYear);
  const lowest = (site: InputSite): number => toDegrees(lowestInclination(padOf(toSite(site)), speed));
  return evaluateStudy(inputs).map((result: SiteResult, at) => {
    const site = inputs.sites[at];
    const states = flown?.[at];
    return {
      result: states ? flownSite(result, states, flightsPerYear) : result,
      ...(states ? { states } : {}),
      flightsPerYear,
      lowestInclinationDeg: site ? lowest(site) : 0,
    };
  });
}

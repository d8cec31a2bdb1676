import { computeFlights } from '#components/flight/compute.ts';
import { nameOf } from '#components/flight/words.ts';
import { mapTrack } from '#components/map/track.ts';
import type { MapTrack } from '#components/map/types.ts';
import type { OrbitResult, SiteResult } from '#contract/evaluate.ts';
import { formatNumber } from '#contract/format.ts';
import type { Site } from '#contract/site.ts';
import type { InputOrbit, StudyInputs } from '#contract/study-inputs.ts';
import { radiusOf } from '#core/flight/orbit.ts';
import { fromDegrees, fromKilometres, metres } from '#core/units.ts';

/** Beyond this many results the screen flies the chosen site alone. */
export const MOST_RESULTS = 6_000;

/** What each of the sites gives for every orbit; the sites are the table's, edits included. */
export function flySites(inputs: StudyInputs, sites: readonly Site[]): Map<string, SiteResult> {
  const flown = computeFlights({
    ...inputs,
    sites: sites.map(({ id, code, name, latitudeDeg, longitudeDeg, elevationM, permittedAzimuthsDeg }) => ({
      siteId: id,
      code,
      name,
      latitudeDeg,
      longitudeDeg,
      elevationM,
      permittedAzimuthsDeg,
    })),
  });
  return new Map(sites.flatMap(({ id }, index) => (flown[index] ? [[id, flown[index]] as const] : [])));
}

/** "Station supply, 51.6°" */
export const orbitTitle = (orbit: InputOrbit, { inclinationDeg }: OrbitResult): string =>
  `${nameOf(orbit)}, ${formatNumber(inclinationDeg, 1)}°`;

/** The first orbit's ground track from a site by the way that is flown; null where none is. */
export function trackOf(site: Site, orbit: InputOrbit, result: OrbitResult): MapTrack | null {
  if (result.way === 'out-of-reach') return null;
  const parked = result.profile === 'parking';
  const radius = (km: number) => metres(radiusOf(fromKilometres(km)));
  const title = orbitTitle(orbit, result);
  return mapTrack(site.id, result.way === 'direct' ? title : `${title}: first leg`, {
    latitude: fromDegrees(site.latitudeDeg),
    longitude: fromDegrees(site.longitudeDeg),
    inertialAzimuth: fromDegrees(result.inertialAzimuthDeg),
    perigeeRadius: radius(parked ? orbit.parkingKm : orbit.perigeeKm),
    apogeeRadius: radius(parked ? orbit.parkingKm : orbit.apogeeKm),
  });
}

import type { SiteResult } from '#contract/evaluate.ts';
import { LONGEST_KM } from '#contract/downrange-range.ts';
import type { InputSite, StudyInputs } from '#contract/study-inputs.ts';
import type { TableClass } from '#contract/vehicle-class.ts';
import { VEHICLE_CLASSES, type VehicleClass } from '#core/downrange/vehicle-class.ts';

/** What the section looks at: a site, an azimuth, a class, and the assumptions. */
export interface Launch {
  readonly site: InputSite;
  readonly azimuthDeg: number;
  readonly vehicleClass: VehicleClass;
  readonly rangeKm: number;
  readonly spread: boolean;
  readonly densityPerKm2: number;
  /** Near, middle and far, square statute miles; null where they are the class's as remembered. */
  readonly areasMi2: readonly number[] | null;
}

export const CLASS_NAMES: Readonly<Record<VehicleClass, string>> = {
  small: 'Small',
  medium: 'Medium',
  'medium-large': 'Medium large',
  large: 'Large',
};

/** Ranges offered, km; the last is the regulation's 5,000 nautical miles. */
export const RANGES_KM = [500, 1000, 2000, 5000, LONGEST_KM] as const;

export const isVehicleClass = (text: string | null): text is VehicleClass =>
  VEHICLE_CLASSES.some((name) => name === text);

/** The class of the address, else the vehicle's, else the smallest: without a vehicle someone has to choose. */
export const classFrom = (asked: string | null, told: TableClass | null): VehicleClass =>
  isVehicleClass(asked) ? asked : (told?.vehicleClass ?? 'small');

/** An azimuth of the address, 0 to below 360; null where it is none. */
export function azimuthFrom(text: string | null): number | null {
  if (text === null || text.trim() === '') return null;
  const azimuth = Number(text);
  return Number.isFinite(azimuth) && azimuth >= 0 && azimuth <= 360 ? azimuth % 360 : null;
}

/** Turned by so many degrees, through north both ways, to a tenth. */
export function turned(azimuthDeg: number, stepDeg: number): number {
  const tenths = Math.round((azimuthDeg + stepDeg) * 10);
  return (((tenths % 3600) + 3600) % 3600) / 10;
}

/** A launch azimuth that an orbit of the manifest is flown at from a site. */
export interface FlownAzimuth {
  readonly name: string;
  readonly azimuthDeg: number;
}

/** The launch azimuths flown from a site, one for each orbit it reaches, to a tenth of a degree. */
export function flownAzimuths(
  { sites, orbits }: StudyInputs,
  results: readonly SiteResult[],
  siteId: string,
): FlownAzimuth[] {
  const at = sites.findIndex((site) => site.siteId === siteId);
  return (results[at]?.orbits ?? []).flatMap((result, order) => {
    const orbit = orbits[order];
    if (!orbit || result.way === 'out-of-reach') return [];
    return [{ name: orbit.name || orbit.code, azimuthDeg: turned(result.launchAzimuthDeg, 0) }];
  });
}

/** The same assumptions in every request, so that the figures of the sheet belong together. */
function common({ site, spread, densityPerKm2 }: Launch): URLSearchParams {
  return new URLSearchParams({
    siteId: site.siteId,
    spreadPeople: String(spread),
    placeDensityPerKm2: String(densityPerKm2),
  });
}

/** The addresses that a launch is asked for at. The version of the inputs asks anew when a site has moved. */
export function addressesOf(studyId: string, launch: Launch) {
  const base = `/api/v1/studies/${studyId}/downrange`;
  const { azimuthDeg, vehicleClass, rangeKm, areasMi2, site } = launch;
  const place = `#${site.latitudeDeg},${site.longitudeDeg}`;
  const fan = common(launch);
  fan.set('vehicleClass', vehicleClass);
  fan.set('rangeKm', String(rangeKm));
  const corridor = new URLSearchParams(fan);
  corridor.set('azimuthDeg', String(azimuthDeg));
  if (areasMi2) corridor.set('casualtyAreasMi2', areasMi2.join(','));
  return {
    fan: `${base}/fan?${fan.toString()}${place}`,
    corridor: `${base}/corridor?${corridor.toString()}${place}`,
    file: `${base}/corridor.geojson?${corridor.toString()}`,
    surroundings: `${base}/surroundings?${common(launch).toString()}${place}`,
  };
}

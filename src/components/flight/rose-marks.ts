import type { OrbitResult } from '#contract/evaluate.ts';
import { formatNumber } from '#contract/format.ts';
import type { InputOrbit, InputSite } from '#contract/study-inputs.ts';
import { toSite } from '#contract/to-core.ts';
import { inertialAzimuths, launchVector } from '#core/flight/launch-azimuth.ts';
import { padOf, type Pad } from '#core/flight/pad.ts';
import { isPermitted } from '#core/flight/sectors.ts';
import { fromDegrees, metresPerSecond, toDegrees } from '#core/units.ts';

/** A launch azimuth on the rose. */
export interface RoseMark {
  azimuthDeg: number;
  /** flown for the chosen orbit · permitted for another · not permitted */
  kind: 'flown' | 'permitted' | 'not-permitted';
  /** Of the chosen orbit, drawn heavier. */
  chosen: boolean;
  words: string;
}

export interface OrbitOfRose {
  orbit: InputOrbit;
  result: OrbitResult;
  injectionSpeedMps: number;
}

/** The northerly and southerly launch azimuths of an orbit from a site, permitted or not. */
export function answersDeg(pad: Pad, { result, injectionSpeedMps }: OrbitOfRose): number[] {
  return inertialAzimuths(pad.geocentricLatitude, fromDegrees(result.inclinationDeg)).map((azimuth) =>
    toDegrees(launchVector(azimuth, metresPerSecond(injectionSpeedMps), pad.rotationSpeed).launchAzimuth),
  );
}

const isFlown = (azimuthDeg: number, { result }: OrbitOfRose): boolean =>
  result.way === 'direct' && Math.abs(result.launchAzimuthDeg - azimuthDeg) < 1e-6;

/** Every azimuth worth drawing for a site: both answers of each orbit, and the leg flown where that is neither. */
export function roseMarks(site: InputSite, orbits: readonly OrbitOfRose[], chosenOrbit: string): RoseMark[] {
  const pad = padOf(toSite(site));
  const marks = orbits.flatMap((of) => {
    const chosen = of.orbit.code === chosenOrbit;
    const inclination = `${formatNumber(of.result.inclinationDeg, 1)}°`;
    const answers = answersDeg(pad, of).map((azimuthDeg): RoseMark => {
      const permitted = isPermitted(pad.sectors, fromDegrees(azimuthDeg));
      const branch = Math.cos((azimuthDeg * Math.PI) / 180) >= -1e-9 ? 'northerly' : 'southerly';
      const flown = chosen && isFlown(azimuthDeg, of);
      return {
        azimuthDeg,
        kind: flown ? 'flown' : permitted ? 'permitted' : 'not-permitted',
        chosen,
        words: `${inclination} ${branch}${flown ? ', flown' : permitted ? ' ✓' : ' ✕'}`,
      };
    });
    const leg: RoseMark[] =
      chosen && of.result.way !== 'direct' && of.result.way !== 'out-of-reach'
        ? [
            {
              azimuthDeg: of.result.launchAzimuthDeg,
              kind: 'flown',
              chosen,
              words: `flown, then a ${of.result.way === 'dogleg' ? 'dogleg' : 'plane change'} to ${inclination}`,
            },
          ]
        : [];
    return [...answers, ...leg];
  });
  return marks.sort((a, b) => a.azimuthDeg - b.azimuthDeg);
}

import { useAddressParam } from '#components/live/address.ts';
import { readTypedNumber } from '#contract/format.ts';
import { LONGEST_KM } from '#contract/downrange-range.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';
import { siteFrom } from './site.ts';
import type { TableClass } from '#contract/vehicle-class.ts';
import { PLACE_DENSITY_PER_KM2 } from '#core/downrange/spread.ts';
import { RANGES_KM, azimuthFrom, classFrom, type FlownAzimuth, type Launch } from './launch.ts';

/** What the address says of the view, read on the server. */
export interface DownrangeAddress {
  readonly site: string | null;
  readonly azimuth: string | null;
  readonly class: string | null;
  readonly range: string | null;
  readonly spread: string | null;
  readonly density: string | null;
  readonly areas: string | null;
}

const within = (text: string | null, least: number, most: number): number | null => {
  const value = text === null ? undefined : readTypedNumber(text);
  return typeof value === 'number' && value >= least && value <= most ? value : null;
};

/** Three areas of the address, or null for those remembered. */
function areasFrom(text: string | null): number[] | null {
  const areas = (text ?? '').split(',').map((part) => within(part, 1e-9, 100));
  return areas.length === 3 && areas.every((area) => area !== null) ? (areas as number[]) : null;
}

/** The launch looked at, kept in the address, so that a link shows a colleague the same corridor. */
export function useLaunch(
  inputs: StudyInputs,
  address: DownrangeAddress,
  told: TableClass | null,
  flownOf: (siteId: string) => readonly FlownAzimuth[],
) {
  const [code, setSite] = useAddressParam('site', address.site);
  const [azimuth, setAzimuth] = useAddressParam('azimuth', address.azimuth);
  const [vehicleClass, setClass] = useAddressParam('class', address.class);
  const [range, setRange] = useAddressParam('range', address.range);
  const [spread, setSpread] = useAddressParam('spread', address.spread);
  const [density, setDensity] = useAddressParam('density', address.density);
  const [areas, setAreas] = useAddressParam('areas', address.areas);
  const site = siteFrom(inputs, code);
  const flown = site ? flownOf(site.siteId) : [];
  const rangeKm = RANGES_KM.find((one) => String(one) === range) ?? LONGEST_KM;
  const launch: Launch | null = site
    ? {
        site,
        azimuthDeg: azimuthFrom(azimuth) ?? flown[0]?.azimuthDeg ?? 90,
        vehicleClass: classFrom(vehicleClass, told),
        rangeKm,
        spread: spread !== 'off',
        densityPerKm2: within(density, 1, 100_000) ?? PLACE_DENSITY_PER_KM2,
        areasMi2: areasFrom(areas),
      }
    : null;
  return {
    launch,
    flown,
    setSite,
    setAzimuth: (deg: number) => setAzimuth(String(deg)),
    setClass,
    setRange,
    setSpread: (on: boolean) => setSpread(on ? null : 'off'),
    setDensity,
    setAreas,
  };
}
export type LaunchDesk = ReturnType<typeof useLaunch>;

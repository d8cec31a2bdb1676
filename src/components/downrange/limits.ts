import type { FanSpoke } from '#contract/downrange.ts';
import { writeSectors } from '#core/csv/sectors.ts';
import {
  inclinationsOpened,
  openSectors,
  openWidth,
  type OpenInclinations,
  type OpenSector,
} from '#core/downrange/open-sectors.ts';
import type { Spoke } from '#core/downrange/fan.ts';
import { circularSpeed, radiusOf } from '#core/flight/orbit.ts';
import { padOf } from '#core/flight/pad.ts';
import { fromKilometres } from '#core/units.ts';
import { readTypedNumber } from '#contract/format.ts';
import { toSite } from '#contract/to-core.ts';
import type { InputSite } from '#contract/study-inputs.ts';
import { degrees } from './words.ts';

/** Limits as typed. */
export interface TypedLimits {
  readonly clearKm: string;
  readonly people: string;
  readonly exclusionEmpty: boolean;
}

export interface ReadLimits {
  readonly clearKm: number | null;
  readonly people: number | null;
  readonly exclusionEmpty: boolean;
}

type LimitErrors = Partial<Record<'clearKm' | 'people', string>>;

function limitOf(text: string, what: string): { value: number | null; error?: string } {
  const value = readTypedNumber(text);
  if (value === undefined) return { value: null };
  if (typeof value === 'string') return { value: null, error: `${what} “${value}” is not a number.` };
  return value < 0 ? { value: null, error: `${what} is 0 or more.` } : { value };
}

/** Reads the typed limits; an empty one sets none. */
export function readLimits(typed: TypedLimits): { limits: ReadLimits; errors: LimitErrors } {
  const clear = limitOf(typed.clearKm, 'Clear distance');
  const people = limitOf(typed.people, 'People');
  return {
    limits: { clearKm: clear.value, people: people.value, exclusionEmpty: typed.exclusionEmpty },
    errors: {
      ...(clear.error ? { clearKm: clear.error } : {}),
      ...(people.error ? { people: people.error } : {}),
    },
  };
}

export const setsNone = ({ clearKm, people, exclusionEmpty }: ReadLimits): boolean =>
  clearKm === null && people === null && !exclusionEmpty;

/** Core's spoke of one that crossed the wire; whose land it is does not matter to limits. */
const spokeOf = (spoke: FanSpoke): Spoke => ({
  azimuthDeg: spoke.azimuthDeg,
  first: {
    coast: spoke.coastKm === null ? null : spoke.coastKm * 1000,
    land: spoke.firstLandKm === null ? null : { distance: spoke.firstLandKm * 1000, country: 0 },
  },
  people: spoke.people,
  settlements: spoke.settlements,
  withoutFigure: spoke.settlementsWithoutFigure,
  spread:
    spoke.spreadPeople === null
      ? null
      : { people: spoke.spreadPeople, unknownLand: (spoke.unknownPeopleLandKm2 ?? 0) * 1e6 },
  excludedPeople: spoke.excludedPeople,
  excludedSettlements: spoke.excludedSettlements,
});

/** Azimuths that keep within limits, and what they open. */
export interface Offer {
  readonly sectors: readonly OpenSector[];
  /** As the Sites table reads it: "35-120; 200-250". */
  readonly text: string;
  readonly widthDeg: number;
  readonly inclinations: readonly OpenInclinations[];
}

/**
 * The sectors that keep within limits, with the inclinations flown along them without a turn.
 * @param parkingKm the altitude of the circular orbit that is flown into
 */
export function offerOf(
  spokes: readonly FanSpoke[],
  { clearKm, people, exclusionEmpty }: ReadLimits,
  site: InputSite,
  parkingKm: number,
): Offer {
  const sectors = openSectors(spokes.map(spokeOf), {
    clearDistance: clearKm === null ? null : clearKm * 1000,
    people,
    exclusionEmpty,
  });
  const speed = circularSpeed(radiusOf(fromKilometres(parkingKm)));
  return {
    sectors,
    text: writeSectors(sectors.map(({ fromDeg, toDeg }) => [fromDeg, toDeg] as const)),
    widthDeg: openWidth(sectors),
    inclinations: inclinationsOpened(padOf(toSite(site)), sectors, speed),
  };
}

/** "28.5° to 57.0°, 95.1° to 102.4°" */
export const inclinationsInWords = (inclinations: readonly OpenInclinations[]): string =>
  inclinations
    .map(
      ({ fromDeg, toDeg }) =>
        `${degrees(Number(fromDeg.toFixed(1)))} to ${degrees(Number(toDeg.toFixed(1)))}`,
    )
    .join(', ');

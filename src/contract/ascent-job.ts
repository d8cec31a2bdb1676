import type { EvaluateOrbit, EvaluateSite, FlightSettings } from './evaluate.ts';
import type { VehicleInput } from './vehicle.ts';
import { z } from './zod.ts';

/**
 * The version of the flown ascent's method: raised when its figures move, so that earlier results are told from new
 * ones.
 */
export const ASCENT_METHOD = 1;

/** What of a site a flown ascent follows from. */
export type AscentSite = Pick<
  EvaluateSite,
  'latitudeDeg' | 'longitudeDeg' | 'elevationM' | 'permittedAzimuthsDeg'
>;
/** What of a target orbit a flown ascent follows from. */
export type AscentOrbit = Pick<
  EvaluateOrbit,
  'perigeeKm' | 'apogeeKm' | 'inclinationDeg' | 'sunSynchronous' | 'profile' | 'parkingKm'
>;

/** One ascent to be flown. */
export interface AscentTask {
  site: AscentSite;
  orbit: AscentOrbit;
  vehicle: VehicleInput;
  settings: FlightSettings;
}

const figure = z.number().nullable();

/** A flown ascent without its trajectory; every figure is null where it did not converge. */
export const AscentFigures = z
  .object({
    converged: z.boolean(),
    reason: z.string().nullable().meta({ description: 'Why it did not converge' }),
    payloadKg: figure,
    flownInclinationDeg: figure,
    burnOutS: figure,
    launchHeadingDeg: figure,
    maxDynamicPressurePa: figure,
    idealDeltaVMps: figure,
    relativeSpeedMps: figure,
    centrifugalMps: figure,
    lossesMps: z.object({ gravity: figure, drag: figure, steering: figure, backPressure: figure }).nullable(),
    remainderMps: figure,
  })
  .meta({ id: 'AscentFigures' });
export type AscentFigures = z.infer<typeof AscentFigures>;

export type AscentOutcome = AscentFigures & { trajectory: readonly unknown[] };

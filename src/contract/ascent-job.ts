import {
  AscentInput,
  ConvergedAscent,
  DEFAULT_HEADING_SPEED_MPS,
  NoAscent,
  type AscentOutput,
} from './ascent.ts';
import { z } from './zod.ts';

/**
 * The version of the flown ascent's method: raised when its figures move, so that earlier results are told from new
 * ones.
 */
export const ASCENT_METHOD = 1;

/** What of a site a flown ascent follows from. */
export type AscentSite = Pick<
  AscentInput['site'],
  'latitudeDeg' | 'longitudeDeg' | 'elevationM' | 'permittedAzimuthsDeg'
>;
/** What of a target orbit a flown ascent follows from. */
export type AscentOrbit = Pick<
  AscentInput['orbit'],
  'perigeeKm' | 'apogeeKm' | 'inclinationDeg' | 'sunSynchronous' | 'profile' | 'parkingKm'
>;

/** One ascent to be flown, as the interface takes it. */
export type AscentTask = AscentInput;
export const AscentTask = AscentInput;
export type AscentOutcome = AscentOutput;

/** A study's settings as a flight takes them; where the sectors are checked is no setting of the study. */
export const ascentSettings = ({ turnSpeedFraction }: { turnSpeedFraction: number }) => ({
  turnSpeedFraction,
  headingSpeedMps: DEFAULT_HEADING_SPEED_MPS,
});

/** A flown ascent without its trajectory; every figure is null where it did not converge. */
export const AscentFigures = z
  .discriminatedUnion('converged', [
    ConvergedAscent.omit({ trajectory: true }),
    NoAscent.omit({ trajectory: true }),
  ])
  .meta({ id: 'AscentFigures' });
export type AscentFigures = z.infer<typeof AscentFigures>;

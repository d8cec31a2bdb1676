import { listOf } from './list.ts';
import { checkOrbit, InclinationDeg, targetOrbitFields } from './orbit.ts';
import { VehicleInput } from './vehicle.ts';
import { z } from './zod.ts';

export const MAX_ORBITS = 40;

const OrbitCode = z
  .string()
  .trim()
  .min(1, 'A code has a character or more.')
  .max(40, 'A code has up to 40 characters.');
const OrbitName = z.string().trim().max(120, 'A name has up to 120 characters.');

/** A target orbit of the manifest as it is kept. `inclinationDeg` is null where the orbit is sun-synchronous. */
export const StudyOrbit = z
  .object({
    id: z.uuid(),
    position: z.int().meta({ description: 'Place in the manifest, from 0' }),
    code: z.string(),
    name: z.string(),
    perigeeKm: z.number(),
    apogeeKm: z.number(),
    inclinationDeg: z.number().nullable(),
    sunSynchronous: z.boolean(),
    profile: z.enum(['auto', 'direct', 'parking']),
    parkingKm: z.number(),
    flightsPerYear: z.number(),
    version: z.int(),
  })
  .meta({ id: 'StudyOrbit' });
export type StudyOrbit = z.infer<typeof StudyOrbit>;

export const OrbitList = listOf(StudyOrbit);
export type OrbitList = z.infer<typeof OrbitList>;

/** A target orbit for the manifest; it comes last unless a position is given, and gets a code where none is. */
export const OrbitInput = z
  .strictObject({
    ...targetOrbitFields,
    code: OrbitCode.optional(),
    name: OrbitName.default(''),
    position: z.int().min(0).optional(),
  })
  .check(checkOrbit)
  .meta({ id: 'OrbitInput' });
export type OrbitInput = z.infer<typeof OrbitInput>;
export type OrbitDraft = z.input<typeof OrbitInput>;

/**
 * Only what is sent changes; the orbit that comes of it is checked whole. An inclination ends sun-synchronous and
 * the other way round. `position` moves the orbit there and the others round it.
 */
export const OrbitPatch = z
  .strictObject({
    code: OrbitCode.optional(),
    name: OrbitName.optional(),
    perigeeKm: targetOrbitFields.perigeeKm.optional(),
    apogeeKm: targetOrbitFields.apogeeKm.optional(),
    inclinationDeg: InclinationDeg.nullable().optional(),
    sunSynchronous: z.boolean().optional(),
    profile: z.enum(['auto', 'direct', 'parking']).optional(),
    parkingKm: targetOrbitFields.perigeeKm.optional(),
    flightsPerYear: targetOrbitFields.flightsPerYear.unwrap().optional(),
    position: z.int().min(0).optional(),
    version: z.int().optional(),
  })
  .meta({ id: 'OrbitPatch' });
export type OrbitPatch = z.infer<typeof OrbitPatch>;

/** The study's vehicle: its own copy, and the library entry it was taken from. Version 0 where there is none yet. */
export const StudyVehicle = z
  .object({
    vehicle: VehicleInput.nullable(),
    libraryVehicleId: z.uuid().nullable(),
    version: z.int(),
  })
  .meta({ id: 'StudyVehicle' });
export type StudyVehicle = z.infer<typeof StudyVehicle>;

/** A vehicle of the library by its id, or one entered. */
export const StudyVehicleInput = z
  .strictObject({
    libraryVehicleId: z.uuid().optional(),
    vehicle: VehicleInput.optional(),
    version: z.int().optional(),
  })
  .refine(({ libraryVehicleId, vehicle }) => (libraryVehicleId === undefined) !== (vehicle === undefined), {
    path: ['vehicle'],
    error: 'Send a vehicle, or libraryVehicleId: one of the two.',
  })
  .meta({ id: 'StudyVehicleInput' });
export type StudyVehicleInput = z.infer<typeof StudyVehicleInput>;

/** A vehicle of the shared library. */
export const LibraryVehicle = z
  .object({
    id: z.uuid(),
    code: z.string(),
    name: z.string(),
    vehicle: VehicleInput,
    archived: z.boolean(),
    version: z.int(),
    updatedAt: z.iso.datetime(),
  })
  .meta({ id: 'LibraryVehicle' });
export type LibraryVehicle = z.infer<typeof LibraryVehicle>;

export const LibraryVehicleList = listOf(LibraryVehicle);
export type LibraryVehicleList = z.infer<typeof LibraryVehicleList>;

/** Zero would make every turn free, so the fraction lies above it. */
export const TurnSpeedFraction = z
  .number()
  .gt(0, 'The fraction lies above 0 and is 1 at most.')
  .max(1, 'The fraction lies above 0 and is 1 at most.')
  .meta({ description: 'Share of the injection speed flown by the time of a dogleg, up to 7° of arc' });

/** Where the losses of the Δv budget come from. */
export const LossesSource = z.enum(['entered', 'flown']).meta({
  description: 'entered: the vehicle’s own losses. flown: those of each site’s flown ascent',
});
export type LossesSource = z.infer<typeof LossesSource>;

export const StudySettings = z
  .object({ turnSpeedFraction: TurnSpeedFraction, losses: LossesSource, version: z.int() })
  .meta({ id: 'StudySettings' });
export type StudySettings = z.infer<typeof StudySettings>;

export const SettingsPatch = z
  .strictObject({
    turnSpeedFraction: TurnSpeedFraction.optional(),
    losses: LossesSource.optional(),
    version: z.int().optional(),
  })
  .meta({ id: 'SettingsPatch' });
export type SettingsPatch = z.infer<typeof SettingsPatch>;

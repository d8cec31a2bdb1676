import { sunSynchronousInclination } from '#core/flight/orbit.ts';
import { fromKilometres } from '#core/units.ts';
import { z } from './zod.ts';

export const DEFAULT_PARKING_KM = 185;

/** Altitude of an orbit over the equatorial radius. Below 80 km nothing orbits; 1,000,000 km is where the Earth's hold ends. */
export const OrbitAltitudeKm = z
  .number()
  .min(80, 'An orbit’s altitude lies between 80 km and 1,000,000 km.')
  .max(1_000_000, 'An orbit’s altitude lies between 80 km and 1,000,000 km.')
  .meta({ description: 'Altitude over the equatorial radius, 6,378.137 km' });

export const InclinationDeg = z
  .number()
  .min(0, 'An inclination lies between 0° and 180°.')
  .max(180, 'An inclination lies between 0° and 180°.')
  .meta({ description: 'Inclination to the equator; above 90° is retrograde' });

export const ProfileChoice = z.enum(['auto', 'direct', 'parking']).meta({
  description:
    'Direct: burn-out at perigee. Parking: burn-out in a circular parking orbit, then two burns. Auto: the cheaper one',
});
export type ProfileChoice = z.infer<typeof ProfileChoice>;

/** The fields of a target orbit, before the rules that hold between them; forms extend these. */
export const targetOrbitFields = {
  name: z.string().max(120).optional(),
  perigeeKm: OrbitAltitudeKm,
  apogeeKm: OrbitAltitudeKm,
  inclinationDeg: InclinationDeg.optional(),
  sunSynchronous: z.boolean().optional().meta({ description: 'The inclination follows from the altitudes' }),
  profile: ProfileChoice.default('auto'),
  parkingKm: OrbitAltitudeKm.default(DEFAULT_PARKING_KM),
  flightsPerYear: z
    .number()
    .min(0, 'Flights a year are 0 or more.')
    .max(1000, 'Flights a year are 1,000 at most.')
    .default(0),
};

interface OrbitRules {
  perigeeKm: number;
  apogeeKm: number;
  inclinationDeg?: number | undefined;
  sunSynchronous?: boolean | undefined;
  profile: ProfileChoice;
  parkingKm: number;
}

interface Complaint {
  path: (keyof OrbitRules)[];
  message: string;
}

function profileComplaint({ profile, perigeeKm, apogeeKm, parkingKm }: OrbitRules): Complaint | undefined {
  if (profile === 'direct' && perigeeKm > parkingKm) {
    return {
      path: ['profile'],
      message: 'Direct burn-out needs a perigee no higher than the parking altitude.',
    };
  }
  if (profile === 'parking' && parkingKm > apogeeKm) {
    return { path: ['parkingKm'], message: 'The parking orbit lies no higher than the apogee.' };
  }
  return undefined;
}

function inclinationComplaint(orbit: OrbitRules): Complaint | undefined {
  const given = orbit.inclinationDeg !== undefined;
  if (orbit.sunSynchronous === true) {
    if (given) {
      return { path: ['inclinationDeg'], message: 'Give an inclination or sunSynchronous, not both.' };
    }
    const { kind } = sunSynchronousInclination(
      fromKilometres(orbit.perigeeKm),
      fromKilometres(orbit.apogeeKm),
    );
    if (kind === 'none') {
      return { path: ['sunSynchronous'], message: 'At these altitudes no inclination is sun-synchronous.' };
    }
    return undefined;
  }
  return given
    ? undefined
    : { path: ['inclinationDeg'], message: 'An inclination is needed, or sunSynchronous.' };
}

/** What is wrong between the fields of an orbit, if anything. Forms and the interface ask the same question. */
export function orbitComplaints(orbit: OrbitRules): Complaint[] {
  if (orbit.perigeeKm > orbit.apogeeKm) {
    return [{ path: ['perigeeKm'], message: 'The perigee lies no higher than the apogee.' }];
  }
  return [inclinationComplaint(orbit), profileComplaint(orbit)].filter((found) => found !== undefined);
}

/** A schema check that reports the complaints between an orbit's fields. */
export function checkOrbit(ctx: z.core.ParsePayload<OrbitRules>): void {
  for (const { path, message } of orbitComplaints(ctx.value)) {
    ctx.issues.push({ code: 'custom', input: ctx.value, path, message });
  }
}

/** One target orbit, as it is posted for a study's manifest or (with a code) for an evaluation. */
export const TargetOrbitInput = z
  .strictObject(targetOrbitFields)
  .check(checkOrbit)
  .meta({ id: 'TargetOrbit', description: 'A target orbit with its flights a year' });
export type TargetOrbitInput = z.infer<typeof TargetOrbitInput>;

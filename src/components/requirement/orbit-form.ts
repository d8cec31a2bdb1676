import { OrbitInput, type OrbitPatch, type StudyOrbit } from '#contract/requirement.ts';

/** The fields of an orbit's form; what is typed and is no number stays as text until the schema refuses it. */
export interface OrbitFields {
  code: string;
  name: string;
  perigeeKm: number | undefined;
  apogeeKm: number | undefined;
  inclinationDeg: number | undefined;
  sunSynchronous: boolean;
  profile: StudyOrbit['profile'];
  parkingKm: number | undefined;
  flightsPerYear: number | undefined;
}

export const ORBIT_FIELDS = [
  'name',
  'code',
  'perigeeKm',
  'apogeeKm',
  'inclinationDeg',
  'sunSynchronous',
  'profile',
  'parkingKm',
  'flightsPerYear',
] as const satisfies readonly (keyof OrbitFields)[];

export const ORBIT_LABELS: Record<keyof OrbitFields, string> = {
  name: 'Name',
  code: 'Code',
  perigeeKm: 'Perigee altitude',
  apogeeKm: 'Apogee altitude',
  inclinationDeg: 'Inclination',
  sunSynchronous: 'Sun-synchronous',
  profile: 'Profile',
  parkingKm: 'Parking altitude',
  flightsPerYear: 'Flights a year',
};

export const fieldsOf = (orbit: StudyOrbit): OrbitFields => ({
  code: orbit.code,
  name: orbit.name,
  perigeeKm: orbit.perigeeKm,
  apogeeKm: orbit.apogeeKm,
  inclinationDeg: orbit.inclinationDeg ?? undefined,
  sunSynchronous: orbit.sunSynchronous,
  profile: orbit.profile,
  parkingKm: orbit.parkingKm,
  flightsPerYear: orbit.flightsPerYear,
});

/** What a form holds as the interface takes it: a sun-synchronous orbit is sent without the inclination left behind. */
const sent = (fields: OrbitFields) => ({
  ...fields,
  inclinationDeg: fields.sunSynchronous ? undefined : fields.inclinationDeg,
});

/** Checks the whole form by the interface's schema. */
export const readOrbit = (fields: OrbitFields) => OrbitInput.safeParse(sent(fields));

/** What of a checked orbit differs from the kept one. */
export function changesOf(orbit: StudyOrbit, input: OrbitInput): Partial<StudyOrbit> {
  const { position: _, ...fields } = input;
  const next = { ...fields, code: fields.code ?? orbit.code, inclinationDeg: fields.inclinationDeg ?? null };
  return Object.fromEntries(
    Object.entries(next).filter(([field, value]) => orbit[field as keyof StudyOrbit] !== value),
  );
}

/** A change of a kept orbit as a patch. */
export const patchOf = (change: Partial<StudyOrbit>, version: number): OrbitPatch => {
  const { id: _id, version: _version, ...fields } = change;
  return { ...fields, version };
};

/** The same orbit to be added again, where it was. */
export const draftOf = (orbit: StudyOrbit) => ({ ...sent(fieldsOf(orbit)), position: orbit.position });

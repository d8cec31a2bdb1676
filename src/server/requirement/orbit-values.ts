import type { OrbitInput, OrbitPatch, StudyOrbit } from '#contract/requirement.ts';
import { orbitComplaints } from '#contract/orbit.ts';
import type { OrbitValues } from '#db/queries/orbit.ts';
import { AppError } from '#server/errors.ts';

/** To the micrometre, so that 500.1 km comes back as 500.1 km. */
const toMetres = (km: number): number => Math.round(km * 1e9) / 1e6;

type Fields = Pick<
  StudyOrbit,
  | 'code'
  | 'name'
  | 'perigeeKm'
  | 'apogeeKm'
  | 'inclinationDeg'
  | 'sunSynchronous'
  | 'profile'
  | 'parkingKm'
  | 'flightsPerYear'
>;

/** An orbit's fields as columns. */
export function orbitColumns(fields: Fields): OrbitValues {
  return {
    code: fields.code,
    name: fields.name,
    perigeeM: toMetres(fields.perigeeKm),
    apogeeM: toMetres(fields.apogeeKm),
    inclinationDeg: fields.inclinationDeg,
    sunSynchronous: fields.sunSynchronous,
    profile: fields.profile,
    parkingM: toMetres(fields.parkingKm),
    flightsPerYear: fields.flightsPerYear,
  };
}

/** A new orbit's fields, which the schema has checked. */
export const inputFields = (input: OrbitInput, code: string): Fields => ({
  ...input,
  code,
  inclinationDeg: input.inclinationDeg ?? null,
  sunSynchronous: input.sunSynchronous ?? false,
});

/** Of two ways to say the plane, the one that is sent takes the place of the other. */
function planeOf(before: Fields, patch: OrbitPatch): Pick<Fields, 'inclinationDeg' | 'sunSynchronous'> {
  const { inclinationDeg, sunSynchronous } = patch;
  if (sunSynchronous === true) return { sunSynchronous, inclinationDeg: inclinationDeg ?? null };
  if (typeof inclinationDeg === 'number') return { sunSynchronous: false, inclinationDeg };
  return {
    sunSynchronous: sunSynchronous ?? before.sunSynchronous,
    inclinationDeg: inclinationDeg === undefined ? before.inclinationDeg : inclinationDeg,
  };
}

/**
 * An orbit's fields after a patch, checked whole by the same rules as a new one's.
 * @throws AppError 'invalid' with the fields at fault
 */
export function patchedFields(before: Fields, patch: OrbitPatch): Fields {
  const { version: _version, position: _position, ...sent } = patch;
  const given = Object.fromEntries(Object.entries(sent).filter(([, value]) => value !== undefined));
  const after: Fields = { ...before, ...given, ...planeOf(before, patch) };
  const complaints = orbitComplaints({ ...after, inclinationDeg: after.inclinationDeg ?? undefined });
  if (complaints.length > 0)
    throw new AppError('invalid', 'Some of the input does not fit. Nothing was saved.', {
      errors: complaints.map(({ path, message }) => ({ path: path.join('.'), message })),
    });
  return after;
}

import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';
import {
  ASCENT_METHOD,
  ascentSettings,
  type AscentOrbit,
  type AscentSite,
  type AscentTask,
} from '#contract/ascent-job.ts';
import type { StudyInputs } from '#contract/study-inputs.ts';
import type { VehicleInput } from '#contract/vehicle.ts';

/** SHA-256, in hexadecimal, of a value's canonical JSON (RFC 8785). */
const sha256 = (value: unknown): string =>
  createHash('sha256')
    .update(canonicalize(value) ?? '', 'utf8')
    .digest('hex');

/** The hash of a vehicle as it is flown: its names and its entered losses are not flown with. */
export function vehicleHash({
  code: _code,
  name: _name,
  lossesMps: _losses,
  ...flown
}: VehicleInput): string {
  return sha256(flown);
}

const siteOf = ({ latitudeDeg, longitudeDeg, elevationM, permittedAzimuthsDeg }: AscentSite): AscentSite => ({
  latitudeDeg,
  longitudeDeg,
  elevationM,
  permittedAzimuthsDeg,
});

/** An orbit's other fields (code, name, flights a year) move no flight. */
function orbitOf({ perigeeKm, apogeeKm, profile, parkingKm, ...plane }: AscentOrbit): AscentOrbit {
  const orbit = { perigeeKm, apogeeKm, profile, parkingKm };
  return plane.sunSynchronous === true
    ? { ...orbit, sunSynchronous: true }
    : { ...orbit, inclinationDeg: plane.inclinationDeg };
}

/** One site and orbit of a study as a flight. */
export interface PairTask {
  siteId: string;
  orbitId: string;
  hash: string;
  /** The task without its vehicle, which many share. */
  task: { site: AscentSite; orbit: AscentOrbit; settings: AscentTask['settings'] };
}

/**
 * Every site and orbit of a study as flights, each by the SHA-256 of its canonical inputs: method, site, orbit and
 * settings, and the vehicle by its own hash, so that twenty thousand are hashed without writing the vehicle out as
 * often.
 */
export function pairTasks(
  { sites, orbits, ...inputs }: Pick<StudyInputs, 'sites' | 'orbits' | 'settings'>,
  vehicle: VehicleInput,
): PairTask[] {
  const flown = vehicleHash(vehicle);
  const settings = ascentSettings(inputs.settings);
  const targets = orbits.map((orbit) => ({ orbitId: orbit.orbitId, orbit: orbitOf(orbit) }));
  return sites.flatMap((row) => {
    const site = siteOf(row);
    return targets.map(({ orbitId, orbit }) => {
      const task = { site, orbit, settings };
      const hash = sha256({ method: ASCENT_METHOD, ...task, vehicle: flown });
      return { siteId: row.siteId, orbitId, hash, task };
    });
  });
}

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

/** Canonical JSON (RFC 8785). */
const canonical = (value: unknown): string => canonicalize(value) ?? '';
const sha256 = (text: string): string => createHash('sha256').update(text, 'utf8').digest('hex');

/** The hash of a vehicle as it is flown: its names and its entered losses are not flown with. */
export function vehicleHash({
  code: _code,
  name: _name,
  lossesMps: _losses,
  ...flown
}: VehicleInput): string {
  return sha256(canonical(flown));
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
 * settings, and the vehicle by its own hash. Canonical JSON has its keys in order, so that of twenty thousand pairs
 * each part is written out once and the whole is put together from them.
 */
export function pairTasks(
  { sites, orbits, ...inputs }: Pick<StudyInputs, 'sites' | 'orbits' | 'settings'>,
  vehicle: VehicleInput,
): PairTask[] {
  const settings = ascentSettings(inputs.settings);
  const head = `{"method":${ASCENT_METHOD},"orbit":`;
  const tail = `,"vehicle":"${vehicleHash(vehicle)}"}`;
  const targets = orbits.map(({ orbitId, ...row }) => {
    const orbit = orbitOf(row);
    return { orbitId, orbit, text: `${head}${canonical(orbit)},"settings":${canonical(settings)},"site":` };
  });
  return sites.flatMap((row) => {
    const site = siteOf(row);
    const rest = canonical(site) + tail;
    return targets.map(({ orbitId, orbit, text }) => ({
      siteId: row.siteId,
      orbitId,
      hash: sha256(text + rest),
      task: { site, orbit, settings },
    }));
  });
}

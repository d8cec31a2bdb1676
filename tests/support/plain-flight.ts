/*
 * The method of flight mechanics written a second time, straight from its formulas and object by object: no closed
 * forms for the turn, no shortcuts, scans instead of searches where asked for. Tests hold core against it, the bench
 * measures core beside it. It knows nothing of core but the shapes of its inputs.
 */
import type { FlightSettings, Site, TargetOrbit, Vehicle } from '#core/flight/types.ts';

const [A, F, MU, OMEGA, G0] = [6_378_137, 1 / 298.257223563, 3.986004418e14, 7.292115e-5, 9.80665];
const RAD = Math.PI / 180;
const DEG = 180 / Math.PI;
const SLACK = 1e-9 * RAD;
const mod = (angle: number) => ((angle % (2 * Math.PI)) + 2 * Math.PI) % (2 * Math.PI);
const cosOf = (angle: number) => (Math.abs(Math.abs(angle) - Math.PI / 2) < 1e-15 ? 0 : Math.cos(angle));
const clamp = (x: number) => Math.min(1, Math.max(-1, x));

export interface PlainWay {
  readonly way: 'direct' | 'plane-change' | 'dogleg';
  readonly branch: 'northerly' | 'southerly';
  readonly profile: 'direct' | 'parking';
  readonly edge: number;
  readonly injection: number;
  readonly launchAzimuth: number;
  readonly required: number;
  readonly turn: number;
  readonly planeChange: number;
  readonly dogleg: number;
  readonly planeChangeCost: number;
  readonly transfer: number;
  readonly total: number;
}

interface PlainProfile {
  readonly profile: 'direct' | 'parking';
  readonly speed: number;
  readonly transfer: number;
  /** Cost of the transfer burns together with a plane change, less the transfer. */
  readonly planeChange: (change: number) => number;
}

/** How finely the scans look; tests take more, the bench searches instead. */
export type Minimise = (f: (x: number) => number, low: number, high: number) => { x: number; value: number };

const speedAt = (r: number, axis: number) => Math.sqrt(MU * (2 / r - 1 / axis));
// Half angles, because v₁² + v₂² − 2 v₁ v₂ cos x loses half the digits of small turns.
const vectorDifference = (v1: number, v2: number, angle: number) =>
  Math.hypot(v1 - v2, 2 * Math.sqrt(v1 * v2) * Math.sin(angle / 2));

function profilesOf(orbit: TargetOrbit, minimise: Minimise): PlainProfile[] {
  const [rp, ra, r0] = [A + orbit.perigeeAltitude, A + orbit.apogeeAltitude, A + orbit.parkingAltitude];
  const axis = (rp + ra) / 2;
  const e = (ra - rp) / (ra + rp);
  const profiles: PlainProfile[] = [];
  if (orbit.profile !== 'parking' && rp <= r0) {
    const atNode = Math.sqrt(MU / (axis * (1 - e * e)));
    profiles.push({
      profile: 'direct',
      speed: speedAt(rp, axis),
      transfer: 0,
      planeChange: (change) => 2 * atNode * Math.sin(change / 2),
    });
  }
  if (orbit.profile !== 'direct' && r0 <= ra) {
    const across = (r0 + ra) / 2;
    const v = [Math.sqrt(MU / r0), speedAt(r0, across), speedAt(ra, across), speedAt(ra, axis)] as const;
    const transfer = Math.abs(v[1] - v[0]) + Math.abs(v[3] - v[2]);
    profiles.push({
      profile: 'parking',
      speed: v[0],
      transfer,
      planeChange: (change) =>
        minimise(
          (share) => vectorDifference(v[0], v[1], share) + vectorDifference(v[2], v[3], change - share),
          0,
          change,
        ).value - transfer,
    });
  }
  return profiles;
}

function isPermitted(site: Site, azimuth: number): boolean {
  if (site.sectors.length === 0) return true;
  return site.sectors.some(({ from, to }) => {
    const width = mod(to - from) || 2 * Math.PI;
    const past = mod(azimuth - from);
    return past <= width + SLACK || past >= 2 * Math.PI - SLACK;
  });
}

function edgesOf(site: Site): number[] {
  const edges: number[] = [];
  for (const bound of site.sectors.flatMap(({ from, to }) => [from, to])) {
    const known = edges.some((edge) => {
      const apart = mod(edge - bound);
      return Math.min(apart, 2 * Math.PI - apart) <= SLACK;
    });
    if (!known) edges.push(mod(bound));
  }
  return edges;
}

interface Place {
  readonly latitude: number;
  readonly rotation: number;
}

function placeOf(site: Site): Place {
  const e2 = F * (2 - F);
  const n = A / Math.sqrt(1 - e2 * Math.sin(site.latitude) ** 2);
  const p = (n + site.height) * cosOf(site.latitude);
  const z = (n * (1 - e2) + site.height) * Math.sin(site.latitude);
  return { latitude: Math.atan2(z, p), rotation: OMEGA * p };
}

const branchOf = (azimuth: number) =>
  Math.cos(azimuth) >= -1e-9 ? ('northerly' as const) : ('southerly' as const);

function wayOf(
  profile: PlainProfile,
  way: Pick<PlainWay, 'way' | 'launchAzimuth' | 'required'> & Partial<PlainWay>,
): PlainWay {
  const { dogleg = 0, planeChangeCost = 0 } = way;
  return {
    edge: -1,
    turn: 0,
    planeChange: 0,
    ...way,
    dogleg,
    planeChangeCost,
    branch: branchOf(way.launchAzimuth),
    profile: profile.profile,
    injection: profile.speed,
    transfer: profile.transfer,
    total: way.required + dogleg + planeChangeCost + profile.transfer,
  };
}

/** Heading of the target plane nearest to the leg's at an arc; the turn, or undefined where the plane does not pass. */
export function turnAt(latitude: number, beta: number, inclination: number, arc: number): number | undefined {
  const sinHere = clamp(
    Math.sin(latitude) * Math.cos(arc) + Math.cos(latitude) * Math.sin(arc) * Math.cos(beta),
  );
  const cosHere = Math.sqrt(1 - sinHere * sinHere);
  const needed = Math.abs(cosOf(inclination));
  // At a pole itself there is no heading to turn from.
  if (cosHere === 0 || needed > cosHere * (1 + 1e-14) + 1e-15) return undefined;
  const heading = Math.atan2(
    Math.cos(latitude) * Math.sin(beta),
    Math.cos(latitude) * Math.cos(beta) * Math.cos(arc) - Math.sin(latitude) * Math.sin(arc),
  );
  const first = Math.asin(clamp(cosOf(inclination) / cosHere));
  const turns = [first, Math.PI - first].map((target) => {
    const apart = mod(heading - target);
    return Math.min(apart, 2 * Math.PI - apart);
  });
  return Math.min(...turns);
}

/** Cost of turning at an arc in units of the injection speed; infinite where it does not count. */
export function turnCost(
  latitude: number,
  beta: number,
  inclination: number,
  arc: number,
  k: number,
): number {
  const turn = turnAt(latitude, beta, inclination, arc);
  if (turn === undefined || turn > 60 * RAD + SLACK) return Infinity;
  const degrees = arc * DEG;
  const share = degrees <= 7 ? k : k + ((1 - k) * (degrees - 7)) / 8;
  return 2 * share * Math.sin(turn / 2);
}

function edgeWays(
  place: Place,
  orbit: TargetOrbit,
  profile: PlainProfile,
  edge: number,
  index: number,
  k: number,
  minimise: Minimise,
): PlainWay[] {
  const { latitude, rotation } = place;
  const required =
    -rotation * Math.sin(edge) + Math.sqrt(profile.speed ** 2 - (rotation * Math.cos(edge)) ** 2);
  const beta = Math.atan2(required * Math.sin(edge) + rotation, required * Math.cos(edge));
  const flown = Math.acos(clamp(Math.cos(latitude) * Math.sin(beta)));
  const change = Math.abs(orbit.inclination - flown);
  const leg = { launchAzimuth: edge, required, edge: index };
  const ways: PlainWay[] = [];
  if (change <= 60 * RAD + SLACK) {
    const planeChangeCost = profile.planeChange(change);
    ways.push(wayOf(profile, { ...leg, way: 'plane-change', planeChange: change, planeChangeCost }));
  }
  const best = minimise((arc) => turnCost(latitude, beta, orbit.inclination, arc, k), 0, 15 * RAD);
  if (best.value < Infinity) {
    const turn = turnAt(latitude, beta, orbit.inclination, best.x) ?? NaN;
    ways.push(wayOf(profile, { ...leg, way: 'dogleg', turn, dogleg: best.value * profile.speed }));
  }
  return ways;
}

function answers(place: Place, orbit: TargetOrbit): number[] {
  const [cosLatitude, cosInclination] = [Math.max(cosOf(place.latitude), 0), cosOf(orbit.inclination)];
  const needed = Math.abs(cosInclination);
  if (needed > cosLatitude * (1 + 1e-14) + 1e-15) return [];
  if (cosLatitude < 1e-15) return [0, Math.PI];
  if (needed >= cosLatitude * (1 - 1e-14) - 1e-15) return [cosInclination > 0 ? Math.PI / 2 : 1.5 * Math.PI];
  const north = Math.asin(clamp(cosInclination / cosLatitude));
  return [north, Math.PI - north];
}

function waysOfProfile(
  site: Site,
  place: Place,
  orbit: TargetOrbit,
  profile: PlainProfile,
  k: number,
  minimise: Minimise,
): PlainWay[] {
  const fly = (beta: number) => {
    const onAxis = Math.abs(Math.cos(beta)) < 1e-15;
    const east = profile.speed * Math.sin(beta) - place.rotation;
    const north = onAxis ? 0 : profile.speed * Math.cos(beta);
    return { launchAzimuth: mod(Math.atan2(east, north)), required: Math.hypot(east, north) };
  };
  const betas = answers(place, orbit);
  const direct = betas.map(fly).filter(({ launchAzimuth }) => isPermitted(site, launchAzimuth));
  const ways = direct.map((flown) => wayOf(profile, { ...flown, way: 'direct' }));
  if (betas.length === 0) {
    const prograde = orbit.inclination <= Math.PI / 2;
    const flown = fly(prograde ? Math.PI / 2 : 1.5 * Math.PI);
    const nearest = prograde ? Math.abs(place.latitude) : Math.PI - Math.abs(place.latitude);
    const change = Math.abs(orbit.inclination - nearest);
    if (isPermitted(site, flown.launchAzimuth)) {
      if (change > 60 * RAD + SLACK) return [];
      const planeChangeCost = profile.planeChange(change);
      return [wayOf(profile, { ...flown, way: 'plane-change', planeChange: change, planeChangeCost })];
    }
  }
  if (ways.length > 0) return ways;
  return edgesOf(site).flatMap((edge, index) => edgeWays(place, orbit, profile, edge, index, k, minimise));
}

/** Every way to fly an orbit from a site, profile by profile. */
export function plainWays(
  site: Site,
  orbit: TargetOrbit,
  settings: FlightSettings,
  minimise: Minimise,
): PlainWay[] {
  const place = placeOf(site);
  return profilesOf(orbit, minimise).flatMap((profile) =>
    waysOfProfile(site, place, orbit, profile, settings.turnSpeedFraction, minimise),
  );
}

const ORDER = {
  way: ['direct', 'plane-change', 'dogleg'],
  branch: ['northerly', 'southerly'],
  profile: ['direct', 'parking'],
};

/** Of the ways within 1e-6 m/s of the least the first in precedence. */
export function plainChoice(ways: readonly PlainWay[]): PlainWay | undefined {
  const least = Math.min(...ways.map(({ total }) => total));
  const rank = (way: PlainWay) => [
    ORDER.way.indexOf(way.way),
    ORDER.branch.indexOf(way.branch),
    ORDER.profile.indexOf(way.profile),
    way.edge,
  ];
  const before = (a: PlainWay, b: PlainWay) => {
    const [x, y] = [rank(a), rank(b)];
    const at = x.findIndex((value, k) => value !== y[k]);
    return at < 0 ? 0 : (x[at] as number) - (y[at] as number);
  };
  return ways.filter(({ total }) => total <= least + 1e-6).sort(before)[0];
}

/** Payload by halving, from the burns written out anew; negative where even none falls short. */
export function plainPayload(vehicle: Vehicle, deltaV: number): number {
  const given = (payload: number): number => {
    const { boosters, stages, fairingMass } = vehicle;
    const count = boosters?.count ?? 0;
    const boosterMass = boosters ? count * (boosters.dryMass + boosters.propellantMass) : 0;
    let aboard = stages.reduce(
      (sum, s) => sum + s.dryMass + s.propellantMass,
      payload + fairingMass + boosterMass,
    );
    let sum = 0;
    stages.forEach((stage, index) => {
      let left: number = stage.propellantMass;
      const mean = (s: typeof stage, share: number) =>
        s.seaLevelImpulse === undefined
          ? s.vacuumImpulse
          : s.seaLevelImpulse * (1 - share) + s.vacuumImpulse * share;
      let impulse = index === 0 ? mean(stage, 0.8) : stage.vacuumImpulse;
      if (index === 0 && boosters && count > 0) {
        const coreFlow = stage.vacuumThrust / (G0 * stage.vacuumImpulse);
        const boosterFlow = (count * boosters.vacuumThrust) / (G0 * boosters.vacuumImpulse);
        const time = (count * boosters.propellantMass) / boosterFlow;
        const both =
          (coreFlow * mean(stage, 0.75) + boosterFlow * mean(boosters, 0.75)) / (coreFlow + boosterFlow);
        const burnt = (coreFlow + boosterFlow) * time;
        sum += G0 * both * Math.log(aboard / (aboard - burnt));
        aboard -= burnt + count * boosters.dryMass;
        left -= coreFlow * time;
        impulse = stage.vacuumImpulse;
      }
      sum += G0 * impulse * Math.log(aboard / (aboard - left));
      aboard -= left + stage.dryMass + (index + 1 === vehicle.fairingLeavesAfterStage ? fairingMass : 0);
    });
    return sum;
  };
  if (given(0) < deltaV) return -1;
  let [low, high] = [0, 1];
  while (given(high) > deltaV) high *= 2;
  while (high - low > 1e-5) {
    const middle = (low + high) / 2;
    if (given(middle) > deltaV) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

import { ANGLE_SLACK, isNortherly, wrap } from './azimuths.ts';
import { bestDogleg } from './dogleg.ts';
import type { Leg } from './dogleg.ts';
import { planeChangeCost, planeChangeFloor } from './injection.ts';
import type { Injection, Target } from './injection.ts';
import { reachOf, sinInertialAzimuth } from './launch-azimuth.ts';
import type { Reach } from './launch-azimuth.ts';
import type { Pad } from './pad.ts';
import { isPermitted } from './sectors.ts';
import type { Edge } from './sectors.ts';
import type { FlightSettings } from './types.ts';
import { PROFILES, TIE } from './way-list.ts';
import type { WayList, WayRecord } from './way-list.ts';

/** Turns and plane changes of more than 60° are out of reach. */
const LARGEST_CHANGE = Math.PI / 3 + ANGLE_SLACK;
const EAST = Math.PI / 2;
const WEST = 1.5 * Math.PI;

const [DIRECT, PLANE_CHANGE, DOGLEG] = [0, 1, 2];

/** Everything one listing needs, so that the steps below share one shape. */
interface Listing {
  readonly pad: Pad;
  readonly target: Target;
  readonly early: number;
  readonly ways: WayList;
  /** Every way, or only those that may turn out the cheapest. */
  readonly all: boolean;
}

function start(ways: WayList, kind: number, injection: Injection): WayRecord {
  const way = ways.next();
  way.kind = kind;
  way.profile = PROFILES.indexOf(injection.profile);
  way.injectionSpeed = injection.speed;
  way.transfer = injection.transfer;
  return way;
}

function close(way: WayRecord): void {
  way.total = way.requiredSpeed + way.doglegCost + way.planeChangeCost + way.transfer;
}

/** cos²φ′ − cos²i, by sines or by cosines, whichever keep their digits where the two answers draw together. */
function roomOf({ sinLatitude, cosLatitude }: Pad, { sinInclination, cosInclination }: Target): number {
  const room =
    cosLatitude > 0.7
      ? (sinInclination - sinLatitude) * (sinInclination + sinLatitude)
      : (cosLatitude - cosInclination) * (cosLatitude + cosInclination);
  return Math.max(room, 0);
}

/** The northerly (sign 1) or southerly (−1) answer flown directly, if its launch azimuth is permitted. */
function addAnswer({ pad, target, ways }: Listing, injection: Injection, sin: number, sign: number): boolean {
  const cos = sin === 0 ? sign : (sign * Math.sqrt(roomOf(pad, target))) / pad.cosLatitude;
  const east = injection.speed * sin - pad.rotationSpeed;
  const north = injection.speed * cos;
  const launchAzimuth = wrap(Math.atan2(east, north));
  if (!isPermitted(pad.sectors, launchAzimuth)) return false;
  const way = start(ways, DIRECT, injection);
  way.branch = sign > 0 ? 0 : 1;
  way.inertialAzimuth = wrap(Math.atan2(sin, cos));
  way.launchAzimuth = launchAzimuth;
  way.requiredSpeed = Math.sqrt(east * east + north * north);
  close(way);
  return true;
}

/** Due east or west at an inclination that one azimuth alone reaches; β is exactly 90° or 270°. */
function addOneAnswer({ pad, target, ways }: Listing, injection: Injection): boolean {
  const east = target.cosInclination > 0;
  const azimuth = east ? EAST : WEST;
  if (!isPermitted(pad.sectors, azimuth)) return false;
  const way = start(ways, DIRECT, injection);
  way.branch = 0;
  way.inertialAzimuth = azimuth;
  way.launchAzimuth = azimuth;
  way.requiredSpeed = injection.speed - (east ? pad.rotationSpeed : -pad.rotationSpeed);
  close(way);
  return true;
}

/** The answers of a reached inclination; whether any is permitted. */
function addAnswers(listing: Listing, injection: Injection, reach: Reach): boolean {
  if (reach === 'one') return addOneAnswer(listing, injection);
  const sin = sinInertialAzimuth(listing.pad.cosLatitude, listing.target.cosInclination);
  const northerly = addAnswer(listing, injection, sin, 1);
  // The southerly answer costs the same to the last digit and comes second.
  if (northerly && !listing.all) return true;
  return addAnswer(listing, injection, sin, -1) || northerly;
}

/** Inclination that a site reaches due east or due west, on the side of the one asked for. */
export function nearestFlown(pad: Pad, target: Target): number {
  const latitude = Math.abs(pad.geocentricLatitude);
  return target.inclination <= Math.PI / 2 ? latitude : Math.PI - latitude;
}

/** Due east or west with the rest owed as a plane change; whether that azimuth is permitted, be it in reach or not. */
function addDueEastOrWest({ pad, target, ways }: Listing, injection: Injection): boolean {
  const east = target.inclination <= Math.PI / 2;
  const azimuth = east ? EAST : WEST;
  if (!isPermitted(pad.sectors, azimuth)) return false;
  const change = Math.abs(target.inclination - nearestFlown(pad, target));
  if (change > LARGEST_CHANGE) return true;
  const way = start(ways, PLANE_CHANGE, injection);
  way.branch = 0;
  way.inertialAzimuth = azimuth;
  way.launchAzimuth = azimuth;
  way.requiredSpeed = injection.speed - (east ? pad.rotationSpeed : -pad.rotationSpeed);
  way.planeChange = change;
  way.planeChangeCost = planeChangeCost(injection, change);
  close(way);
  return true;
}

/** A first leg along a sector edge: its speed over the ground and the plane it flies. */
interface EdgeLeg extends Leg {
  readonly requiredSpeed: number;
  readonly inertialAzimuth: number;
  /** i*, 0…π. */
  readonly inclination: number;
}

/** s = −v_e sin β_L + √(v_i² − v_e² cos² β_L), β = atan2(s sin β_L + v_e, s cos β_L), cos i* = cos φ′ sin β. */
export function legAlong(pad: Pad, edge: Edge, injectionSpeed: number): EdgeLeg {
  const { rotationSpeed, cosLatitude, sinLatitude } = pad;
  const across = rotationSpeed * edge.cos;
  const speed = Math.sqrt(injectionSpeed * injectionSpeed - across * across) - rotationSpeed * edge.sin;
  const east = speed * edge.sin + rotationSpeed;
  const north = speed * edge.cos;
  const along = (cosLatitude * north) / injectionSpeed;
  const cos = (cosLatitude * east) / injectionSpeed;
  const sin = Math.sqrt(sinLatitude * sinLatitude + along * along);
  return {
    requiredSpeed: speed,
    inertialAzimuth: wrap(Math.atan2(east, north)),
    inclination: Math.atan2(sin, cos),
    cos,
    sin,
    start: Math.atan2(sinLatitude, along),
  };
}

function startLeg(ways: WayList, kind: number, injection: Injection, edge: Edge, leg: EdgeLeg): WayRecord {
  const way = start(ways, kind, injection);
  way.edge = edge.index;
  way.branch = isNortherly(edge.cos) ? 0 : 1;
  way.inertialAzimuth = leg.inertialAzimuth;
  way.launchAzimuth = edge.azimuth;
  way.requiredSpeed = leg.requiredSpeed;
  return way;
}

function addPlaneChange(
  { ways }: Listing,
  injection: Injection,
  edge: Edge,
  leg: EdgeLeg,
  change: number,
): void {
  const way = startLeg(ways, PLANE_CHANGE, injection, edge, leg);
  way.planeChange = change;
  way.planeChangeCost = planeChangeCost(injection, change);
  close(way);
}

function addDogleg({ target, ways, early }: Listing, injection: Injection, edge: Edge, leg: EdgeLeg): void {
  const dogleg = bestDogleg(leg, { cos: target.cosInclination, sin: target.sinInclination }, early);
  if (dogleg === undefined) return;
  const way = startLeg(ways, DOGLEG, injection, edge, leg);
  way.turn = dogleg.turn;
  way.doglegCost = dogleg.cost * injection.speed;
  close(way);
}

/**
 * The two ways along one sector edge: turn during the ascent, or change the plane in orbit. A turn is never less than
 * the difference of the inclinations, which is what it is at the equator; so 60° of difference rule out both, and one
 * sine tells the least that either can cost.
 */
function addEdge(listing: Listing, injection: Injection, edge: Edge, leg: EdgeLeg): void {
  const change = Math.abs(listing.target.inclination - leg.inclination);
  if (change > LARGEST_CHANGE) return;
  const sinHalf = Math.sin(change / 2);
  const turned = leg.requiredSpeed + injection.transfer + 2 * listing.early * injection.speed * sinHalf;
  if (listing.all || turned <= most(listing.ways)) addDogleg(listing, injection, edge, leg);
  const changed = leg.requiredSpeed + planeChangeFloor(injection, sinHalf);
  if (listing.all || changed <= most(listing.ways)) addPlaneChange(listing, injection, edge, leg, change);
}

/** The most a way may cost and still be taken or tie with what is. */
function most(ways: WayList): number {
  let least = Infinity;
  for (let k = 0; k < ways.length; k++) least = Math.min(least, ways.at(k).total);
  return least + 2 * TIE;
}

/** Index of the leg whose plane lies nearest the target's: worked out first, it rules out most of the others. */
function nearestLeg(legs: readonly EdgeLeg[], { inclination }: Target): number {
  let nearest = 0;
  let least = Infinity;
  for (let k = 0; k < legs.length; k++) {
    const distance = Math.abs((legs[k] as EdgeLeg).inclination - inclination);
    if (distance >= least) continue;
    least = distance;
    nearest = k;
  }
  return nearest;
}

function addEdges(listing: Listing, injection: Injection): void {
  const { edges } = listing.pad.sectors;
  const legs = edges.map((edge) => legAlong(listing.pad, edge, injection.speed));
  const first = nearestLeg(legs, listing.target);
  for (let k = 0; k < edges.length; k++) {
    const at = k === 0 ? first : k <= first ? k - 1 : k;
    addEdge(listing, injection, edges[at] as Edge, legs[at] as EdgeLeg);
  }
}

/**
 * Fills `ways` with the ways to fly a target orbit from a pad, per profile: the permitted answers; where no azimuth
 * reaches the inclination, due east or west with a plane change; and, only where neither is to be had, a first leg
 * along each sector edge with a plane change or a dogleg.
 * @param all false leaves out ways that cannot be the cheapest; the way chosen is the same
 */
export function listWays(
  pad: Pad,
  target: Target,
  settings: FlightSettings,
  ways: WayList,
  all: boolean,
): void {
  ways.clear();
  const listing: Listing = { pad, target, early: settings.turnSpeedFraction, ways, all };
  const reach = reachOf(pad.cosLatitude, target.cosInclination);
  for (const injection of target.injections) {
    const permitted =
      reach === 'none' ? addDueEastOrWest(listing, injection) : addAnswers(listing, injection, reach);
    if (!permitted) addEdges(listing, injection);
  }
}

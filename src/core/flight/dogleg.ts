import { radians } from '../units.ts';
import type { Radians } from '../units.ts';
import { ANGLE_SLACK } from './azimuths.ts';
import { leastOver } from './minimum.ts';

/** Arc of the first leg up to which k holds, and the arc at which a turn costs its full speed. */
const EARLY = (7 * Math.PI) / 180;
const LATE = (15 * Math.PI) / 180;
const LARGEST_TURN = Math.PI / 3 + ANGLE_SLACK;
const COS_LARGEST = Math.cos(LARGEST_TURN);
const SIN_LARGEST_SQUARED = 1 - COS_LARGEST * COS_LARGEST;
/** The chord 2 sin(δ/2) of the largest turn. */
const LARGEST_CHORD = 2 * Math.sin(LARGEST_TURN / 2);

/** The first leg: its plane, and the argument of latitude at which it leaves the site. */
export interface Leg {
  /** cos i* = cos φ′ sin β*. */
  readonly cos: number;
  /** sin i* ≥ 0. */
  readonly sin: number;
  /** u₀ with sin φ′ = sin i* sin u₀ and cos φ′ cos β* = sin i* cos u₀. */
  readonly start: number;
}

/** The plane turned into. */
export interface Plane {
  readonly cos: number;
  readonly sin: number;
}

/** The turn of least cost: `cost` is in units of the injection speed, k(θ) · 2 sin(δ/2). */
export interface Dogleg {
  readonly arc: Radians;
  readonly turn: Radians;
  readonly cost: number;
}

/** k(θ): the share of the injection speed flown by arc θ. */
export function speedShare(early: number, arc: number): number {
  return arc <= EARLY ? early : early + ((1 - early) * (arc - EARLY)) / (LATE - EARLY);
}

/** sin²i − sin²i*, by sines or by cosines, whichever keep their digits. */
function differenceOf(leg: Leg, plane: Plane): number {
  return plane.sin + leg.sin < 1
    ? (plane.sin - leg.sin) * (plane.sin + leg.sin)
    : (leg.cos - plane.cos) * (leg.cos + plane.cos);
}

/**
 * The chord 2 sin(δ/2) between the leg's heading at argument of latitude u and the target plane's heading there, the
 * nearer of its two. With C = sin i* |cos u| and S = √(sin²i − sin²φ) the headings are (cos i*, C) and (cos i, S) over
 * cos φ, and cos²φ = cos²i* + C²; S² − C² = sin²i − sin²i* keeps the digits of small turns.
 */
function chordAt(leg: Leg, plane: Plane, u: number): number {
  const sinLatitude = Math.abs(leg.sin * Math.sin(u));
  const along = leg.sin * Math.abs(Math.cos(u));
  const difference = differenceOf(leg, plane);
  const rest =
    sinLatitude < 0.7 ? (plane.sin - sinLatitude) * (plane.sin + sinLatitude) : difference + along * along;
  const across = rest > 0 ? Math.sqrt(rest) : 0;
  const opposite = plane.cos * leg.cos < 0;
  const east = opposite ? plane.cos - leg.cos : -difference / (plane.cos + leg.cos || 1);
  const north = across + along === 0 ? 0 : difference / (across + along);
  const radius = Math.sqrt(leg.cos * leg.cos + along * along);
  return radius === 0 ? 0 : Math.sqrt(east * east + north * north) / radius;
}

/**
 * sin of the highest latitude at which the turn is 60° or less and the target plane still passes; −1 where there is
 * none. The turn grows with |φ|; it is 60° where cos²φ sin²60° = cos²i + cos²i* − 2 cos i cos i* cos 60°.
 */
function sinHighest(leg: Leg, plane: Plane): number {
  const product = plane.cos * leg.cos;
  const larger = Math.max(plane.cos * plane.cos, leg.cos * leg.cos);
  if (product >= COS_LARGEST * larger) return plane.sin;
  const squares = plane.cos * plane.cos + leg.cos * leg.cos;
  const cosSquared = (squares - 2 * product * COS_LARGEST) / SIN_LARGEST_SQUARED;
  if (cosSquared > 1) return -1;
  return Math.min(plane.sin, Math.sqrt(1 - cosSquared));
}

/** Whether the target plane passes a latitude, with the slack of reach, for the two ends of the arc. */
function passes(leg: Leg, plane: Plane, u: number): boolean {
  const along = leg.sin * Math.cos(u);
  return Math.abs(plane.cos) <= Math.sqrt(leg.cos * leg.cos + along * along) * (1 + 1e-14) + 1e-15;
}

/** The search for one leg: keeps the best turn found over the stretches of arc where the target plane is in reach. */
class Search {
  private arc = -1;
  private cost = Infinity;

  constructor(
    private readonly leg: Leg,
    private readonly plane: Plane,
    private readonly early: number,
  ) {}

  private costAt(arc: number): number {
    return speedShare(this.early, arc) * chordAt(this.leg, this.plane, this.leg.start + arc);
  }

  consider(arc: number, cost = this.costAt(arc)): void {
    if (cost >= this.cost) return;
    this.arc = arc;
    this.cost = cost;
  }

  /** A stretch of arc from `low`, and the arc in it at which the leg is nearest the equator: beyond, all gets dearer. */
  stretch(low: number, nearest: number): void {
    if (low <= EARLY) this.consider(Math.min(nearest, EARLY));
    if (nearest > EARLY) this.late(Math.max(low, EARLY), nearest);
  }

  /** Beyond 7° the share rises while the turn falls towards the equator; a square root may open the stretch. */
  private late(low: number, high: number): void {
    const floor = speedShare(this.early, low) * chordAt(this.leg, this.plane, this.leg.start + high);
    if (floor >= this.cost) return;
    const width = high - low;
    const found = leastOver((t) => this.costAt(low + width * t * t), 0, 1, 8, 1e-8);
    this.consider(low + width * found.at * found.at, found.value);
  }

  found(): Dogleg | undefined {
    if (this.arc < 0) return undefined;
    const chord = chordAt(this.leg, this.plane, this.leg.start + this.arc);
    return { arc: radians(this.arc), turn: radians(2 * Math.asin(Math.min(chord / 2, 1))), cost: this.cost };
  }
}

/** The arcs 0…15° where |sin u| ≤ ratio lie about the leg's crossings of the equator, u = nπ. */
function searchStretches(search: Search, start: number, ratio: number): void {
  const half = ratio >= 1 ? Math.PI / 2 : Math.asin(ratio);
  for (let n = -1; n <= 1; n++) {
    const crossing = n * Math.PI - start;
    const low = Math.max(crossing - half, 0);
    const high = Math.min(crossing + half, LATE);
    if (low <= high) search.stretch(low, Math.min(Math.max(crossing, low), high));
  }
}

/**
 * The cheapest turn out of a first leg into the target plane within 15° of arc.
 *
 * At arc θ the turn δ costs 2 k(θ) v_i sin(δ/2); turns of more than 60° do not count.
 * @param early k, the share of the injection speed up to 7° of arc, rising to 1 at 15°
 * @returns the turn, or undefined where no arc allows one
 * @see tests/core/flight/dogleg.test.ts, which scans the arc finely
 */
export function bestDogleg(leg: Leg, plane: Plane, early: number): Dogleg | undefined {
  const search = new Search(leg, plane, early);
  const highest = sinHighest(leg, plane);
  if (highest < 0) return undefined;
  searchStretches(search, leg.start, leg.sin <= highest ? 1 : highest / leg.sin);
  const found = search.found();
  if (found !== undefined) return found;
  for (const arc of [0, LATE]) {
    const u = leg.start + arc;
    if (passes(leg, plane, u) && chordAt(leg, plane, u) <= LARGEST_CHORD) search.consider(arc);
  }
  return search.found();
}

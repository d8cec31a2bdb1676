import { inclinationFlown } from '../launch-azimuth.ts';
import { afterInjection, changesPlane, problemOf } from './attempt.ts';
import type { Attempt } from './attempt.ts';
import { Maximiser } from './maximise.ts';
import type { Search } from './maximise.ts';
import {
  AZIMUTH,
  COAST,
  FIRST_TANGENT,
  INCLINATION,
  LAST_TANGENT,
  SIZE,
  TILT,
  VARIABLES,
  YAW,
} from './operational.ts';
import type { Operational } from './operational.ts';
import { roughPayload } from './rocket.ts';

/** Losses of a first guess at the payload, m/s: the middle of the usual ones, back-pressure among them. */
const ROUGH_LOSSES = 1750;
/** A place to start from: the kick's tilt, or the path it is to lead to when the upper stages begin; the tangents. */
interface Start {
  /** rad */
  readonly tilt?: number;
  /** Flight-path angle over the ground at the start of the upper stages, rad. */
  readonly path?: number;
  readonly first: number;
  readonly last: number;
  /** Share of the rough payload: losses of a vehicle that pushes little are more than the usual. */
  readonly share: number;
}

/** Starts in the order tried: what serves most vehicles, then paths from middling to steep and flat. */
const STARTS: readonly Start[] = [
  { tilt: 0.1, first: 0.5, last: 0, share: 1 },
  { path: 0.35, first: 0.45, last: 0, share: 1 },
  { path: 0.6, first: 0.5, last: 0, share: 0.6 },
  { path: 0.2, first: 0.7, last: -0.1, share: 0.9 },
  { path: 0.9, first: 0.4, last: 0, share: 0.3 },
  { path: 0.6, first: 0.25, last: 0, share: 1 },
  { path: 0.08, first: 1, last: -0.3, share: 1 },
];
/** Tilts between which a path is looked for, and the halvings spent on it. */
const LEAST_TILT = 2e-3;
const MOST_TILT = 0.8;
const HALVINGS = 9;
const LIMITS = { iterations: 40, stride: 8 };
/** The plane is turned by no more than this at a time when a dogleg is led up to, rad. */
const TURN_STEP = 0.15;
/** Above this altitude a coast before the upper stages pays, m; and what to start from, in s per m beyond. */
const COASTING_FROM = 350_000;
const COAST_GUESS = 1 / 4000;

/** What a search came to: every variable of the operational steering, and how it ended. */
export interface Found {
  readonly search: Search;
  readonly variables: Float64Array;
  /** Starting points tried. */
  readonly starts: number;
  /** Flights from lift-off, for all of them. */
  readonly flights: number;
}

type Ended = Pick<Found, 'search' | 'variables'>;

/**
 * Searches one problem from all the variables given.
 * @param best whether the payload is made as large as can be, or any that meets the conditions does
 */
function search(problem: Operational, from: Float64Array, best = true): Ended {
  const maximiser = new Maximiser(problem);
  problem.all.set(from);
  problem.active.forEach((place, k) => {
    maximiser.variables[k] = from[place] as number;
  });
  const gain = best ? (problem.scales[problem.objective] as number) * 1e-4 : Infinity;
  const ended = maximiser.run({ ...LIMITS, gain });
  const variables = from.slice();
  problem.active.forEach((place, k) => {
    variables[place] = maximiser.variables[k] as number;
  });
  return { search: ended, variables };
}

/** How far above the altitude from which a coast pays, m; 0 or more. */
const aboveCoasting = ({ radius, course }: Attempt): number =>
  Math.max(0, radius - course.flyer.planet.equatorialRadius - COASTING_FROM);

/** The plane of the way's first leg. */
const legInclination = ({ pad, way }: Attempt): number =>
  inclinationFlown(pad.geocentricLatitude, way.inertialAzimuth);

/** The tilt whose gravity turn leads to a path when the upper stages begin: the more tilt, the flatter. */
function tiltFor(attempt: Attempt, variables: Float64Array, path: number): number {
  const problem = problemOf(attempt, [], undefined);
  problem.all.set(variables);
  let [low, high] = [LEAST_TILT, MOST_TILT];
  for (let k = 0; k < HALVINGS; k++) {
    const middle = Math.sqrt(low * high);
    problem.all[TILT] = middle;
    if (problem.flyFirst() && attempt.course.flyer.pathNow() > path) low = middle;
    else high = middle;
  }
  return low;
}

/** The variables of a start; the plane is the target's, or the one the way reaches. */
function startOf(attempt: Attempt, { tilt, path, first, last, share }: Start): Float64Array {
  const { way, target, course } = attempt;
  const after = afterInjection(attempt);
  const inclination = changesPlane(attempt) ? legInclination(attempt) : target.inclination;
  const variables = new Float64Array(VARIABLES);
  variables[AZIMUTH] = way.launchAzimuth;
  variables[FIRST_TANGENT] = first;
  variables[LAST_TANGENT] = last;
  variables[COAST] = aboveCoasting(attempt) * COAST_GUESS;
  variables[INCLINATION] = inclination;
  const deltaV = way.requiredSpeed + ROUGH_LOSSES + after(inclination);
  variables[SIZE] = share * roughPayload(course.stack, deltaV);
  variables[TILT] = tilt ?? tiltFor(attempt, variables, path ?? 0);
  return variables;
}

const STEERED = [TILT, AZIMUTH, SIZE, FIRST_TANGENT, LAST_TANGENT, YAW];

/** From the equator into its plane nothing leads out of it, and nothing may: the flight is due east or due west. */
const staysOnEquator = ({ pad, target, way }: Attempt): boolean =>
  way.kind === 'direct' && Math.abs(pad.sinLatitude) < 1e-9 && target.sinInclination < 1e-9;

/** The variables that are chosen at last. */
function activeOf(attempt: Attempt, edge: number | undefined): readonly number[] {
  if (edge === undefined && staysOnEquator(attempt))
    return [TILT, SIZE, FIRST_TANGENT, LAST_TANGENT, INCLINATION];
  return changesPlane(attempt) ? [...STEERED, INCLINATION] : STEERED;
}

/** The last search of a way: as large a payload as can be, the coast free where one pays. */
function finish(attempt: Attempt, from: Float64Array, edge: number | undefined): Ended {
  const active = activeOf(attempt, edge);
  const found = search(problemOf(attempt, active, edge), from);
  if (found.search.outcome !== 'converged' || aboveCoasting(attempt) === 0) return found;
  const coasting = search(problemOf(attempt, [...active, COAST], edge), found.variables);
  return coasting.search.outcome === 'converged' ? coasting : found;
}

/** The heading held at an edge: first in the plane that gives, then turned by the yaw into the one asked for. */
function alongEdge(attempt: Attempt, from: Float64Array, edge: number): Ended {
  const start = from.slice();
  start[INCLINATION] = legInclination(attempt);
  const straight = [TILT, AZIMUTH, SIZE, FIRST_TANGENT, LAST_TANGENT, INCLINATION];
  let found = search(problemOf(attempt, straight, edge), start, false);
  if (found.search.outcome !== 'converged') return found;
  if (changesPlane(attempt)) return finish(attempt, found.variables, edge);
  const problem = problemOf(attempt, STEERED, edge);
  const flown = found.variables[INCLINATION] as number;
  const turn = attempt.target.inclination - flown;
  const steps = Math.max(1, Math.ceil(Math.abs(turn) / TURN_STEP));
  for (let k = 1; k < steps; k++) {
    found.variables[INCLINATION] = flown + (turn * k) / steps;
    found = search(problem, found.variables, false);
    if (found.search.outcome !== 'converged') return found;
  }
  found.variables[INCLINATION] = attempt.target.inclination;
  return finish(attempt, found.variables, edge);
}

/**
 * Searches from each start in turn until one converges.
 * @param warm variables of a neighbouring flight by the same kind of way, tried first
 * @param edge heading to be held, rad; undefined where it is free
 */
export function searchWay(attempt: Attempt, warm: Float64Array | undefined, edge: number | undefined): Found {
  const before = attempt.course.flights;
  let best: Ended = {
    search: { outcome: 'cannot-be-flown', iterations: 0, residual: Infinity },
    variables: new Float64Array(VARIABLES),
  };
  let tried = 0;
  for (const start of warm === undefined ? STARTS : [warm, ...STARTS]) {
    tried += 1;
    const from = start instanceof Float64Array ? start : startOf(attempt, start);
    const found = edge === undefined ? finish(attempt, from, edge) : alongEdge(attempt, from, edge);
    if (found.search.residual <= best.search.residual) best = found;
    if (found.search.outcome === 'converged') break;
  }
  return { ...best, starts: tried, flights: attempt.course.flights - before };
}

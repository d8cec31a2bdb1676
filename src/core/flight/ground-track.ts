import { constants } from '../constants.ts';
import { metres, radians } from '../units.ts';
import type { Metres, Radians, Seconds } from '../units.ts';
import { ECCENTRICITY_SQUARED as e2 } from './earth.ts';
import { periodOf } from './orbit.ts';

export interface GroundTrackInput {
  /** Geodetic latitude, −π/2…π/2, north positive. */
  readonly latitude: Radians;
  /** Longitude, −π < λ ≤ π, east positive. */
  readonly longitude: Radians;
  /** Azimuth of the flown plane in the frame that doesn't turn, clockwise from north, 0 ≤ β < 2π. */
  readonly inertialAzimuth: Radians;
  /** Radius at the pad's place on the arc: the perigee. */
  readonly perigeeRadius: Metres;
  /** Radius half a turn on; equal to the perigee's for a circular orbit. */
  readonly apogeeRadius: Metres;
}

/** A place on the ellipsoid: geodetic latitude and longitude. */
export interface TrackPoint {
  readonly latitude: Radians;
  readonly longitude: Radians;
}

export interface TrackTick extends TrackPoint {
  /** Distance over the ground from the pad. */
  readonly distance: Metres;
  /** Direction of the track there over the ground, clockwise from north, 0 ≤ h < 2π. */
  readonly heading: Radians;
}

export interface GroundTrack {
  /** The track in pieces that don't cross the date line. */
  readonly pieces: readonly (readonly TrackPoint[])[];
  readonly ticks: readonly TrackTick[];
  /** Time of the first revolution in space. */
  readonly period: Seconds;
}

interface Sample extends TrackPoint {
  readonly distance: number;
  readonly place: readonly [number, number, number];
}

const STEPS = 720;
const TICK_EVERY = 1e6;
const TURN = 2 * Math.PI;
const a = constants.equatorialRadius.value;
const omega = constants.rotationRate.value;

/** −π < λ ≤ π. */
const wrap = (longitude: number): Radians => {
  const turned = longitude - TURN * Math.floor((longitude + Math.PI) / TURN);
  return radians(turned === -Math.PI ? Math.PI : turned);
};

/** Time from perigee to true anomaly u (0…2π), s: Kepler's equation forward. */
function timeAt(u: number, eccentricity: number, period: number): number {
  const half = u / 2;
  const E =
    2 *
    Math.atan2(Math.sqrt(1 - eccentricity) * Math.sin(half), Math.sqrt(1 + eccentricity) * Math.cos(half));
  return ((E - eccentricity * Math.sin(E)) * period) / TURN;
}

/** Earth-fixed place of a point of the ellipsoid, m. */
function placeOf({ latitude, longitude }: TrackPoint): [number, number, number] {
  const N = a / Math.sqrt(1 - e2 * Math.sin(latitude) ** 2);
  const p = N * Math.cos(latitude);
  return [p * Math.cos(longitude), p * Math.sin(longitude), N * (1 - e2) * Math.sin(latitude)];
}

/** The point under arc u of the plane, time t after launch. */
function pointAt(phi: number, longitude: number, beta: number, u: number, t: number): TrackPoint {
  const sine = Math.sin(phi) * Math.cos(u) + Math.cos(phi) * Math.sin(u) * Math.cos(beta);
  const geocentric = Math.asin(Math.max(-1, Math.min(1, sine)));
  const east = Math.sin(beta) * Math.sin(u);
  const ahead = Math.cos(phi) * Math.cos(u) - Math.sin(phi) * Math.sin(u) * Math.cos(beta);
  return {
    latitude: radians(Math.atan2(Math.sin(geocentric), (1 - e2) * Math.cos(geocentric))),
    longitude: wrap(longitude + Math.atan2(east, ahead) - omega * t),
  };
}

/** Direction from one place to the next over the ground, clockwise from north. */
function headingBetween(from: Sample, to: Sample): Radians {
  const [dx, dy, dz] = from.place.map((value, axis) => (to.place[axis] ?? 0) - value) as [
    number,
    number,
    number,
  ];
  const { latitude, longitude } = from;
  const outward = Math.cos(longitude) * dx + Math.sin(longitude) * dy;
  const east = -Math.sin(longitude) * dx + Math.cos(longitude) * dy;
  const north = -Math.sin(latitude) * outward + Math.cos(latitude) * dz;
  return radians((Math.atan2(east, north) + TURN) % TURN);
}

/** Cut where the longitude jumps: the piece ends on ±π and the next begins on the other side. */
function cutAtDateLine(samples: readonly Sample[]): TrackPoint[][] {
  const pieces: TrackPoint[][] = [[]];
  samples.forEach((point, index) => {
    const before = samples[index - 1];
    const step = before ? point.longitude - before.longitude : 0;
    if (before && Math.abs(step) > Math.PI) {
      const edge = before.longitude > 0 ? Math.PI : -Math.PI;
      const whole = TURN - Math.abs(step);
      const share = whole === 0 ? 0 : Math.abs(edge - before.longitude) / whole;
      const latitude = radians(before.latitude + share * (point.latitude - before.latitude));
      pieces.at(-1)?.push({ latitude, longitude: radians(edge) });
      pieces.push([{ latitude, longitude: radians(-edge) }]);
    }
    pieces.at(-1)?.push({ latitude: point.latitude, longitude: point.longitude });
  });
  return pieces;
}

function ticksAlong(samples: readonly Sample[]): TrackTick[] {
  const ticks: TrackTick[] = [];
  samples.forEach((to, index) => {
    const from = samples[index - 1];
    const distance = (ticks.length + 1) * TICK_EVERY;
    if (!from || to.distance < distance) return;
    const share = (distance - from.distance) / (to.distance - from.distance);
    ticks.push({
      distance: metres(distance),
      latitude: radians(from.latitude + share * (to.latitude - from.latitude)),
      longitude: wrap(from.longitude + share * wrap(to.longitude - from.longitude)),
      heading: headingBetween(from, to),
    });
  });
  return ticks;
}

/**
 * The ground track of the first revolution, from the pad, on the turning Earth.
 *
 * sin φ_u = sin φ′ cos u + cos φ′ sin u cos β; the longitude runs with the arc and back with ωt, where t is the time
 * to true anomaly u by Kepler's equation. The plane stays fixed in space (no nodal drift, some 0.3° a revolution),
 * the pad stands under the perigee and the climb takes no time: a picture of where the orbit leads, not a trajectory.
 * Places are where the line to the Earth's centre meets the WGS 84 ellipsoid.
 *
 * @throws RangeError where the apogee lies below the perigee or the perigee isn't a positive radius
 * @see tests/core/flight/ground-track.test.ts
 */
export function groundTrack(input: GroundTrackInput): GroundTrack {
  const { latitude, longitude, inertialAzimuth: beta, perigeeRadius, apogeeRadius } = input;
  if (!(perigeeRadius > 0) || !(apogeeRadius >= perigeeRadius))
    throw new RangeError(`groundTrack: perigee radius ${perigeeRadius}, apogee radius ${apogeeRadius}`);
  const phi = Math.atan2((1 - e2) * Math.sin(latitude), Math.cos(latitude));
  const axis = (perigeeRadius + apogeeRadius) / 2;
  const eccentricity = (apogeeRadius - perigeeRadius) / (2 * axis);
  const period = periodOf(axis);
  const samples: Sample[] = [];
  for (let step = 0; step <= STEPS; step += 1) {
    const u = (TURN * step) / STEPS;
    const point = pointAt(phi, longitude, beta, u, timeAt(u, eccentricity, period));
    const place = placeOf(point);
    const before = samples.at(-1);
    const chord = before
      ? Math.hypot(place[0] - before.place[0], place[1] - before.place[1], place[2] - before.place[2])
      : 0;
    samples.push({ ...point, place, distance: (before?.distance ?? 0) + chord });
  }
  return { pieces: cutAtDateLine(samples), ticks: ticksAlong(samples), period };
}

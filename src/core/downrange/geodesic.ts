import geographicLib from 'geographiclib-geodesic';
import { metres } from '../units.ts';
import type { Metres } from '../units.ts';

/**
 * A place on the WGS 84 ellipsoid. Downrange keeps places and azimuths in degrees: the geodesic library, the
 * gazetteer, the atlas and GeoJSON all do, and radians in between would only add rounding. Lengths are metres.
 */
export interface Place {
  /** Geodetic, −90…90, north positive. */
  readonly latitudeDeg: number;
  /** −180…180, east positive. */
  readonly longitudeDeg: number;
}

/** A place on a geodesic, with the direction of the geodesic there, clockwise from north. */
export interface Heading extends Place {
  readonly azimuthDeg: number;
}

const { Geodesic } = geographicLib;
const ellipsoid = Geodesic.WGS84;
const POSITION = Geodesic.LATITUDE | Geodesic.LONGITUDE | Geodesic.AZIMUTH;
const INVERSE = Geodesic.DISTANCE | Geodesic.AZIMUTH;

/** What the library left out of an answer it was asked for: a fault of this module, never of the input. */
function given(value: number | undefined): number {
  if (value === undefined) throw new TypeError('geodesic: the library answered without a figure asked for');
  return value;
}

const headingOf = (answer: { lat2?: number; lon2?: number; azi2?: number }): Heading => ({
  latitudeDeg: given(answer.lat2),
  longitudeDeg: given(answer.lon2),
  azimuthDeg: given(answer.azi2),
});

/** The geodesic that leaves a place at an azimuth. */
export class GeodesicPath {
  readonly #line: ReturnType<typeof ellipsoid.DirectLine>;

  constructor(
    readonly start: Place,
    readonly azimuthDeg: number,
  ) {
    // The library's types know no other way to a line; its end is not asked for.
    this.#line = ellipsoid.DirectLine(start.latitudeDeg, start.longitudeDeg, azimuthDeg, 0);
  }

  /** The place after a distance; backwards along the same geodesic where it is negative. */
  at(distance: number): Heading {
    return headingOf(this.#line.Position(distance, POSITION));
  }

  /** The place off to the side of the path: positive to the right, along the geodesic square to it. */
  beside(along: number, across: number): Place {
    const foot = this.at(along);
    if (across === 0) return foot;
    return destination(foot, foot.azimuthDeg + 90, across);
  }
}

/**
 * Where a geodesic leads: the direct problem on the ellipsoid.
 * @param azimuthDeg clockwise from north
 * @param distance m; negative goes the other way
 * @see downrangeReferences.karney, tests/reference/downrange-geodesic.csv
 */
export function destination(from: Place, azimuthDeg: number, distance: number): Heading {
  return headingOf(ellipsoid.Direct(from.latitudeDeg, from.longitudeDeg, azimuthDeg, distance, POSITION));
}

/** Length of the geodesic between two places, and its azimuth at the first: the inverse problem. */
export function between(from: Place, to: Place): { readonly distance: Metres; readonly azimuthDeg: number } {
  const answer = ellipsoid.Inverse(
    from.latitudeDeg,
    from.longitudeDeg,
    to.latitudeDeg,
    to.longitudeDeg,
    INVERSE,
  );
  return { distance: metres(given(answer.s12)), azimuthDeg: given(answer.azi1) };
}
